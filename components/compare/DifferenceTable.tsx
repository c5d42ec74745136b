import { carriedClaims } from '@/components/cells/cellWords';
import { lifeFigure, reachWords, standingWords, toldOf } from '@/components/cells/lifeWords';
import { Link, Table } from '@/components/ui';
import type { CellEntry } from '@/lib/contract/cells';
import { formatMoney, formatNumber, formatPercent, formatQuantity, formatRange, noValue } from '@/lib/units';

/** The cell types row by row: what is measured, how far, and what the label implies at the same use. */
export function DifferenceTable({ entries }: { entries: readonly CellEntry[] }) {
  return (
    <Table
      caption="Cell types at this use"
      rows={entries}
      rowKey={({ cellType }) => cellType.id}
      columns={[
        {
          key: 'name',
          title: 'Cell type',
          cell: ({ cellType }) => (
            <Link href={`/cells/${cellType.id}`} strong>
              {cellType.name}
            </Link>
          ),
        },
        {
          key: 'life',
          title: 'Years to 80 %',
          figures: true,
          cell: ({ life }) => life && yearsWords(life),
        },
        {
          key: 'standing',
          title: 'Standing',
          cell: ({ life, absence }) => (life ? standingWords(life) : absence && 'too few owners yet'),
        },
        {
          key: 'efc',
          title: 'EFC to 80 %',
          figures: true,
          cell: ({ life }) =>
            life && isFigure(life) ? formatRange(life.efc.lower, life.efc.upper, { decimals: 0 }) : noValue,
        },
        {
          key: 'left',
          title: 'Left at reach',
          figures: true,
          cell: ({ life }) =>
            life && life.basis === 'cellType'
              ? `${formatPercent(life.leftAtReachFraction.estimate)} at ${formatQuantity(life.reachYears, 'y', { decimals: 1 })}`
              : noValue,
        },
        { key: 'label', title: 'The label implies', figures: true, cell: (entry) => impliedWords(entry) },
        {
          key: 'banks',
          title: 'Behind it',
          cell: ({ evidence, life }) => life && reachWords(evidence, life),
        },
        {
          key: 'price',
          title: 'Paid per cell',
          figures: true,
          cell: ({ price }) => (price ? formatMoney(price.perCellMinor, price.currency) : noValue),
        },
      ]}
    />
  );
}

type Life = NonNullable<CellEntry['life']>;

const isFigure = (life: Life) => toldOf(life) === 'figure' || toldOf(life) === 'range';

function yearsWords(life: Life): string {
  const { value, range } = lifeFigure(life);
  return range ? `${value} (${range})` : value;
}

/** "15 y; banks reach 0.85 of it" for the claims that can be carried to this use. */
function impliedWords(entry: CellEntry): string | null {
  const carried = carriedClaims(entry.claims);
  const [claim] = carried;
  if (!claim?.label) return entry.claims.length > 0 ? 'conditions not stated' : null;
  const { impliedYears, ratio } = claim.label;
  const years = formatQuantity(impliedYears.estimate, 'y', { decimals: 0 });
  return ratio ? `${years}, measured ${formatNumber(ratio.estimate, { decimals: 2 })} of it` : years;
}
