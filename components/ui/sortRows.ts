export interface Sort {
  key: string;
  descending: boolean;
}

type SortValue = number | string | null | undefined;

const isMissing = (value: SortValue) =>
  value === null || value === undefined || value === '' || Number.isNaN(value);

const compare = (a: NonNullable<SortValue>, b: NonNullable<SortValue>): number => {
  if (typeof a === 'number' && typeof b === 'number') return a - b;
  return String(a).localeCompare(String(b), 'en', { numeric: true });
};

/** The rows in order of a value, equal ones as they stood; missing values last in both directions. */
export function sortedRows<Row>(
  rows: readonly Row[],
  valueOf: ((row: Row) => SortValue) | undefined,
  descending: boolean,
): readonly Row[] {
  if (!valueOf) return rows;
  return [...rows].sort((one, other) => {
    const [a, b] = [valueOf(one), valueOf(other)];
    if (isMissing(a) || isMissing(b)) return Number(isMissing(a)) - Number(isMissing(b));
    const order = compare(a as NonNullable<SortValue>, b as NonNullable<SortValue>);
    return descending ? -order : order;
  });
}
