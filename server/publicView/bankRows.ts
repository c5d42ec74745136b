import type { PoolCheck } from '@/lib/fit/poolCheck';

import { type BankIdentity, generalise, identityKey } from './identity';
import { publishedRow, rowLine } from './publishedRow';
import type { Protections } from './protections';

export interface PublicCheck {
  checkId: string;
  /** As measured; what is public of it is `publishedRow`. */
  row: PoolCheck;
}

/** A bank with its checks and how far its identifying fields are generalised. */
export interface PublicBank {
  bank: string;
  owner: string;
  identity: BankIdentity;
  level: number;
  checks: PublicCheck[];
}

/** A bank whose level is still to be found. */
export type ApprovedBank = Omit<PublicBank, 'level'>;

/** The class of a bank: what all that is said of its identity has in common with its like. */
export const classOf = ({ identity, level }: Pick<PublicBank, 'identity' | 'level'>): string =>
  identityKey(generalise(identity, level));

/** A bank's rows as published. */
export function rowsOf({ identity, level, checks }: PublicBank, protections: Protections): PoolCheck[] {
  const { cellType } = generalise(identity, level);
  return checks.map(({ row }) => publishedRow(row, cellType, protections));
}

/** The same as lines, in order: two banks of the same lines can't be told apart by them. */
export const linesOf = (bank: PublicBank, protections: Protections): string[] =>
  rowsOf(bank, protections).map(rowLine).sort();

/** A bank as a member of a group, weighing as many as its checks. */
export const asOwned = ({ owner, checks }: Pick<PublicBank, 'owner' | 'checks'>) => ({
  owner,
  weight: checks.length,
});

/** Items by key, in order of their first. */
export function groupBy<T>(items: readonly T[], keyOf: (item: T) => string): Map<string, T[]> {
  const groups = new Map<string, T[]>();
  for (const item of items) {
    const key = keyOf(item);
    const known = groups.get(key);
    if (known) known.push(item);
    else groups.set(key, [item]);
  }
  return groups;
}
