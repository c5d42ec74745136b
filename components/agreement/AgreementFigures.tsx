import { type Column, DefinitionList, Heading, Quiet, Stack, Table } from '@/components/ui';
import type { Agreement, Verdict } from '@/lib/contract/agreement';
import { formatCount, formatNumber, formatPercent, formatRange } from '@/lib/units';

import { verdictWords } from './verdictWords';

/** Kappa, the share agreed and how many cases stand behind them, with the table of both verdicts. */
export function AgreementFigures({ agreement }: { agreement: Agreement }) {
  const { kappa, agreedFraction, done, drawn, verdicts, counts } = agreement;
  const rows = verdicts.map((verdict, i) => ({ verdict, counts: counts[i]! }));
  const columns: Column<(typeof rows)[number]>[] = [
    { key: 'first', title: 'First decision', cell: ({ verdict }) => verdictWords[verdict] },
    ...verdicts.map((second: Verdict, j) => ({
      key: second,
      title: verdictWords[second],
      figures: true,
      cell: (row: (typeof rows)[number]) => formatCount(row.counts[j]!),
    })),
  ];
  return (
    <Stack gap="l">
      <DefinitionList
        items={[
          { label: 'Cohen’s kappa', value: kappaWords(kappa), strong: true },
          {
            label: 'Same verdict',
            value:
              agreedFraction === null
                ? 'none yet'
                : `${formatPercent(agreedFraction)} of ${formatCount(done)}`,
          },
          { label: 'Looked at twice', value: `${formatCount(done)} of ${formatCount(drawn)} drawn` },
        ]}
      />
      <Quiet>
        Kappa is the agreement beyond what chance would give: 1 is whole, 0 no more than chance. Its range is
        the large-sample one, wide while the cases are few.
      </Quiet>
      <Heading level={2}>Both verdicts</Heading>
      <Table
        caption="First decision by row, second verdict by column"
        columns={columns}
        rows={rows}
        rowKey={({ verdict }) => verdict}
      />
    </Stack>
  );
}

function kappaWords(kappa: Agreement['kappa']): string {
  if (!kappa) return 'none: both used one verdict only';
  const range = formatRange(kappa.lower, kappa.upper, { decimals: 2 });
  return `${formatNumber(kappa.estimate, { decimals: 2 })} (90 % range ${range})`;
}
