import { useMemo } from 'react';

import { Heading, Quiet, Stack, Table } from '@/components/ui';
import type { CellTypeBrief } from '@/lib/contract/banks';
import type { Use } from '@/lib/contract/cells';
import { fitUse, outlast, type PublishedFit } from '@/lib/fit/pooled/published';
import { formatNumber } from '@/lib/units';

interface OutlastPartProps {
  fit: PublishedFit;
  use: Use;
  cells: readonly CellTypeBrief[];
}

/** Which one lasts longer, pair by pair, and how sure that is. */
export function OutlastPart({ fit, use, cells }: OutlastPartProps) {
  const pairs = useMemo(
    () =>
      cells.flatMap((one, index) =>
        cells.slice(index + 1).map((other) => {
          const held = outlast(fit, fitUse(use), one.id, other.id);
          // Told from the side that is the likelier to last.
          return held.probability >= 0.5
            ? { longer: one, shorter: other, ...held }
            : { longer: other, shorter: one, ...outlast(fit, fitUse(use), other.id, one.id) };
        }),
      ),
    [cells, fit, use],
  );
  return (
    <Stack gap="s">
      <Heading>Which one lasts longer</Heading>
      <Table
        caption="Which one lasts longer"
        rows={pairs}
        rowKey={({ longer, shorter }) => `${longer.id} ${shorter.id}`}
        columns={[
          {
            key: 'pair',
            title: 'Held against each other',
            cell: ({ longer, shorter }) => `${longer.name} outlasts ${shorter.name}`,
          },
          {
            key: 'probability',
            title: 'Probability',
            figures: true,
            cell: ({ probability }) => probabilityWords(probability),
          },
          {
            key: 'ratio',
            title: 'Life of one / the other',
            figures: true,
            cell: ({ ratio }) =>
              `×${formatNumber(ratio.estimate, { decimals: 2 })} (${formatNumber(ratio.lower, { decimals: 2 })} to ${formatNumber(ratio.upper, { decimals: 2 })})`,
          },
        ]}
      />
      <Quiet>
        Of typical banks of each, used alike; single banks differ more. Near 50 % the pool can’t tell them
        apart.
      </Quiet>
    </Stack>
  );
}

/** "83 %", never nearer to certainty than the model can be. */
export function probabilityWords(probability: number): string {
  if (probability > 0.99) return 'over 99 %';
  return `${formatNumber(probability * 100, { decimals: 0 })} %`;
}
