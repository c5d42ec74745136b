import { type Column, Heading, Quiet, Stack, Table, Text } from '@/components/ui';
import type { PastFit } from '@/lib/contract/fits';
import { formatCount, formatInstant, formatNumber, formatRange } from '@/lib/units';

type Life = PastFit['average'];

const lifeWords = ({ years, status }: Life) =>
  status === 'beyond' || status === 'extrapolated'
    ? `${formatRange(years.lower, years.upper, { decimals: 1 })} y`
    : `${formatNumber(years.estimate, { decimals: 1 })} y (${formatRange(years.lower, years.upper, { decimals: 1 })})`;

const columns: Column<PastFit>[] = [
  { key: 'when', title: 'Fitted', cell: ({ fittedAt }) => formatInstant(fittedAt) },
  { key: 'banks', title: 'Banks', figures: true, cell: ({ evidence }) => formatCount(evidence.banks) },
  { key: 'checks', title: 'Checks', figures: true, cell: ({ evidence }) => formatCount(evidence.checks) },
  {
    key: 'life',
    title: 'Average cell type, to 80 %',
    figures: true,
    cell: ({ average }) => lifeWords(average),
  },
  { key: 'version', title: 'Version', cell: ({ codeVersion }) => codeVersion },
];

/** How published lives moved from fit to fit. */
export function HistoryPart({ history }: { history: readonly PastFit[] }) {
  const [now, before] = history;
  return (
    <Stack gap="m">
      <Heading>How lives moved from fit to fit</Heading>
      <Text>
        Every public fit at the use that the list is stated at, newest first. A fit is made when the public
        pool moves, by at least 5 owners at a time.
      </Text>
      <Table
        caption="Public fits"
        columns={columns}
        rows={history}
        rowKey={({ fittedAt }) => fittedAt}
        empty="No fit was published yet."
      />
      {now && before ? (
        <Moves now={now} before={before} />
      ) : (
        <Quiet>There is one fit so far: nothing has moved.</Quiet>
      )}
    </Stack>
  );
}

interface Move {
  name: string;
  now: Life;
  before: Life;
}

function Moves({ now, before }: { now: PastFit; before: PastFit }) {
  const rows = now.lives.flatMap(({ cellType, ...life }): Move[] => {
    const then = before.lives.find((one) => one.cellType.id === cellType.id);
    return then ? [{ name: cellType.name, now: life, before: then }] : [];
  });
  return (
    <Table
      caption="Lives of cell types, this fit against the one before"
      showCaption
      rows={rows}
      rowKey={({ name }) => name}
      columns={[
        { key: 'name', title: 'Cell type', cell: ({ name }) => name, sortValue: ({ name }) => name },
        { key: 'before', title: 'Before', figures: true, cell: (row) => lifeWords(row.before) },
        { key: 'now', title: 'Now', figures: true, cell: (row) => lifeWords(row.now) },
        {
          key: 'moved',
          title: 'Moved, %',
          figures: true,
          cell: (row) => formatNumber(movedPercent(row), { decimals: 1 }),
          sortValue: (row) => Math.abs(movedPercent(row)),
        },
      ]}
    />
  );
}

const movedPercent = ({ now, before }: Move) => (now.years.estimate / before.years.estimate - 1) * 100;
