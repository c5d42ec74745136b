import { median } from 'simple-statistics';

import type { CellPrice } from '@/lib/contract/cells';
import { minimumOwners } from '@/lib/contract/limits';

import { ownerKey, shortHash } from './describeRows';
import type { FitOutput, PricePart } from './fitOutput';

/** What an owner paid for a cell, in the currency's minor units. */
export interface BankPrice {
  owner: string;
  cellType: string;
  currency: string;
  perCellMinor: number;
}

const toTwoDigits = (value: number) => Number(value.toPrecision(2));

/**
 * Median price of each cell type and currency; an owner with several banks has one voice. Rounded to two digits: what
 * a single owner paid is not to be read from it. Not brought to today's money.
 */
export function pricesOf(prices: readonly BankPrice[]): PricePart[] {
  const groups = new Map<string, BankPrice[]>();
  for (const price of prices) {
    const key = `${price.cellType}|${price.currency}`;
    groups.set(key, [...(groups.get(key) ?? []), price]);
  }
  return [...groups.values()].map((group): PricePart => {
    const byOwner = new Map<string, number[]>();
    for (const { owner, perCellMinor } of group)
      byOwner.set(owner, [...(byOwner.get(owner) ?? []), perCellMinor]);
    const { cellType, currency } = group[0]!;
    const isTold = byOwner.size >= minimumOwners;
    const perCellMinor = toTwoDigits(median([...byOwner.values()].map((paid) => median(paid))));
    return {
      ...{ cellType, currency },
      told: isTold ? { currency, perCellMinor } : null,
      owners: isTold
        ? Object.fromEntries(
            [...byOwner].map(([owner, paid]) => [ownerKey(owner), shortHash([...paid].sort().join(' '))]),
          )
        : {},
    };
  });
}

/** The price told of a cell type, in the currency that most owners gave theirs in. */
export function presentPrice({ prices }: Pick<FitOutput, 'prices'>, cellType: string): CellPrice | null {
  const told = prices.filter((part) => part.cellType === cellType && part.told !== null);
  const most = Math.max(...told.map(({ owners }) => Object.keys(owners).length));
  return told.find(({ owners }) => Object.keys(owners).length === most)?.told ?? null;
}
