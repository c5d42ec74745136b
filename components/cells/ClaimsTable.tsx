import { type Column, Figure, Heading, Quiet, Stack, Table, Text } from '@/components/ui';
import type { CellPage, Claim, Label, Life } from '@/lib/contract/cells';
import { formatNumber, formatQuantity, formatRange } from '@/lib/units';

import { claimConditions, claimWords } from './cellWords';
import { lifeFigure, toldOf } from './lifeWords';

const absences = {
  conditionsNotStated: 'conditions not stated',
  cannotBeMet: 'no fade meets it',
  noFit: 'not fitted yet',
} as const;

/** What the label says, each claim with its conditions and what it implies here, beside what was measured. */
export function ClaimsTable({ page }: { page: CellPage }) {
  if (page.claims.length === 0) return <Quiet>No quoted claim is on record for this cell type.</Quiet>;
  const { life } = page.view;
  const isOwn = life?.basis === 'cellType';
  const columns: Column<Claim>[] = [
    { key: 'claim', title: 'The label', cell: (claim) => <Text tone="brass">{claimWords(claim)}</Text> },
    { key: 'conditions', title: 'tested at', cell: conditionsAndPlace },
    {
      key: 'implied',
      title: 'Implies here',
      figures: true,
      cell: ({ label }) =>
        label && (
          <Figure tone="brass">{formatQuantity(label.impliedYears.estimate, 'y', { decimals: 1 })}</Figure>
        ),
    },
    {
      key: 'measured',
      title: 'Measured here',
      figures: true,
      cell: () => {
        if (!life || !isOwn || !['figure', 'range'].includes(toldOf(life))) return null;
        const { value, range } = lifeFigure(life);
        return `${value} y${range && ` (${range})`}`;
      },
    },
    { key: 'ratio', title: 'Ratio', figures: true, cell: ({ label }) => ratioFigure(label, life) },
    {
      key: 'words',
      title: 'in words',
      cell: ({ label, labelAbsence }) => (labelAbsence ? absences[labelAbsence] : ratioWords(label, life)),
    },
  ];
  return (
    <Stack gap="s">
      <Heading level={2}>What the label implies here</Heading>
      <Table
        caption="Quoted claims beside measured life"
        columns={columns}
        rows={page.claims}
        rowKey={({ id }) => id}
      />
      <Quiet>
        A claim is carried to this use on the pool’s own fade, made faster or slower by one factor until it
        meets the claim under the claim’s conditions, in the time that its own currents take. The ratio is
        measured over implied, with its 90 % range; “less” and “longer” are said where that excludes 1.
      </Quiet>
    </Stack>
  );
}

/** "100 %, 0.5 It, 25 °C, clamped", and below it where that stands. */
const conditionsAndPlace = (claim: Claim) => (
  <Stack gap="hair">
    <Text>{claimConditions(claim)}</Text>
    <Quiet>{claim.whereItStands}</Quiet>
  </Stack>
);

/** "0.92 (0.79–1.07)"; the range alone for an extrapolated life, nothing for one past the readings. */
function ratioFigure(label: Label | null, life: Life | null): string | null {
  if (!label?.ratio || !life) return null;
  const { estimate, lower, upper } = label.ratio;
  const range = formatRange(lower, upper, { decimals: 2 });
  const told = toldOf(life);
  if (told === 'figure') return `${formatNumber(estimate, { decimals: 2 })} (${range})`;
  return told === 'range' ? range : null;
}

/** What the range of the ratio allows to say. */
function ratioWords(label: Label | null, life: Life | null): string {
  if (!label?.ratio || !life) return 'not measured for this cell type at this use';
  const { lower, upper } = label.ratio;
  if (toldOf(life) === 'beyond')
    return lower > 1 ? 'longer; how much lies beyond the readings' : 'not told yet';
  const reach = `banks reach about ${formatRange(lower * 100, upper * 100, { decimals: 0, unit: '%' })} of what the label implies at this use`;
  if (upper < 1) return `${reach}: less`;
  return lower > 1 ? `${reach}: longer` : `${reach}: it may be right`;
}
