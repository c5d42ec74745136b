import type { RowProblem } from '@/lib/contract/earlierChecks';

import type { LoadedBank } from '../banks/queries';
import type { Table, TableRow } from './readTable';

export type FoundBank = { bank: LoadedBank; problem?: undefined } | { bank?: undefined; problem: RowProblem };

const plain = (name: string) => name.trim().toLowerCase().replace(/\s+/g, ' ');

/** What the row's column `bank` says, as it stands there. */
export const bankNameIn = ({ columns }: Table, { cells }: TableRow): string => {
  const placed = columns.find(({ column }) => column.field === 'bank');
  return placed ? (cells[placed.index] ?? '').trim() : '';
};

/**
 * The one of an owner's banks that a row is of: by its name, or by its id where two have the same name.
 * @param only the bank that all rows are of; undefined where each row has to say
 */
export function findBank(name: string, banks: readonly LoadedBank[], only?: LoadedBank): FoundBank {
  const refuse = (message: string): FoundBank => ({ problem: { column: 'bank', message } });
  if (name === '') return only ? { bank: only } : refuse('Say which bank this check is of.');
  const meant = banks.filter((bank) => bank.id === name.toLowerCase() || plain(bank.name) === plain(name));
  if (only) {
    if (meant.some(({ id }) => id === only.id)) return { bank: only };
    return refuse(`This row names another bank than ${only.name}.`);
  }
  const [bank, second] = meant;
  if (!bank) return refuse('None of your banks is called so.');
  if (second)
    return refuse(
      `Two of your banks are called so. Put one of their ids here: ${meant.map(({ id }) => id).join(' or ')}.`,
    );
  return { bank };
}
