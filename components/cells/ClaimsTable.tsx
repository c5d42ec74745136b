import { type Column, Figure, Heading, Quiet, Stack, Table, Text } from '@/components/ui';
import type { CellPage, Claim } from '@/lib/contract/cells';
import { formatNumber, formatQuantity } from '@/lib/units';

import { claimConditions, claimWords } from './cellWords';
import { lifeFigure } from './poolWords';
import { quotedYears } from './quotedLife';

/** What the label says, each claim with its conditions, beside what was measured. */
export function ClaimsTable({ page }: { page: CellPage }) {
  if (page.claims.length === 0) return <Quiet>No quoted claim is on record for this cell type.</Quiet>;
  const { use, view } = page;
  const columns: Column<Claim>[] = [
    { key: 'claim', title: 'The label', cell: (claim) => <Text tone="brass">{claimWords(claim)}</Text> },
    { key: 'conditions', title: 'tested at', cell: (claim) => claimConditions(claim) },
    {
      key: 'efc',
      title: 'Full cycles',
      figures: true,
      cell: ({ efc }) => efc && formatNumber(efc, { decimals: 0 }),
    },
    {
      key: 'implied',
      title: 'Once a day here',
      figures: true,
      cell: (claim) => {
        const years = quotedYears(claim, use);
        return years && <Figure tone="brass">{formatQuantity(years, 'y', { decimals: 0 })}</Figure>;
      },
    },
    {
      key: 'measured',
      title: 'Measured banks',
      figures: true,
      cell: () => {
        if (!view.life?.years) return null;
        const { value, range } = lifeFigure(view.life);
        return `${value} y${range && ` (${range})`}`;
      },
    },
    { key: 'where', title: 'Stands in', cell: ({ whereItStands }) => whereItStands },
  ];
  return (
    <Stack gap="s">
      <Heading level={2}>What is quoted</Heading>
      <Table
        caption="Quoted claims beside measured life"
        columns={columns}
        rows={page.claims}
        rowKey={({ id }) => id}
      />
      <Quiet>
        Full cycles are cycles times depth. A claim counts cycles in a laboratory and leaves out ageing by the
        calendar, so it is no forecast for a home.
      </Quiet>
    </Stack>
  );
}
