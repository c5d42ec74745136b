import { bankEventWords, boughtWords, clampingWords } from '@/components/banks/bankWords';
import { type Column, CheckStateChip, DefinitionList, Heading, Stack, Table } from '@/components/ui';
import type { Submission } from '@/lib/contract/moderation';
import { formatDate, formatMonth, formatNumber, formatPercent, formatQuantity } from '@/lib/units';

type HistoryRow = Submission['history'][number];

const columns: Column<HistoryRow>[] = [
  { key: 'date', title: 'Tested', cell: ({ testedOn }) => formatDate(testedOn) },
  {
    key: 'age',
    title: 'Age',
    figures: true,
    cell: ({ ageYears }) => formatQuantity(ageYears, 'y', { decimals: 1 }),
  },
  { key: 'efc', title: 'Full cycles', figures: true, cell: ({ efc }) => formatNumber(efc, { decimals: 0 }) },
  {
    key: 'soh',
    title: 'Capacity left',
    figures: true,
    cell: ({ sohFraction }) => formatPercent(sohFraction, 1),
  },
  {
    key: 'uncertainty',
    title: '± at 95 %',
    figures: true,
    cell: ({ expandedFraction }) => formatPercent(expandedFraction, 1),
  },
  { key: 'state', title: 'State', cell: ({ state }) => <CheckStateChip state={state} /> },
];

/** The bank behind the submission: what it is, what happened to it, and its checks so far. */
export function BankFacts({ submission: { bank, history } }: { submission: Submission }) {
  return (
    <Stack gap="m">
      <Heading>The bank</Heading>
      <DefinitionList
        columns={2}
        items={[
          { label: 'First use', value: formatMonth(bank.firstUseMonth) },
          { label: 'Bought', value: boughtWords[bank.bought] },
          { label: 'Clamping', value: clampingWords[bank.clamping] },
          ...bank.events.map(({ kind, happenedOn, note }) => ({
            label: formatDate(happenedOn),
            value: note ? `${bankEventWords[kind]}: ${note}` : bankEventWords[kind],
          })),
        ]}
      />
      <Table
        caption="Checks of this bank"
        columns={columns}
        rows={history}
        rowKey={({ checkId }) => checkId}
      />
    </Stack>
  );
}
