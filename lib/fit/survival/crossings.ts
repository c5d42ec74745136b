import type { PoolCheck } from '../poolCheck';
import type { IntervalObservation } from './observation';

/** A bank's passage below a level of capacity, in years since first use, with the key of its owner. */
export interface Crossing extends IntervalObservation {
  bank: string;
  owner: string;
}

export interface Crossings {
  crossings: Crossing[];
  /** Banks first seen below the level: they tell nothing of when, among banks that joined before it. */
  alreadyBelow: number;
}

/**
 * When each bank fell below `level` of its rated capacity: between the last check before and the first check
 * below, or not yet. Its first check is its entry: had it been below by that age, it might not have joined.
 * A bank already below at its first check is left out and counted, since no bank like it that stayed away
 * is seen beside it; kept in, it would pull the whole curve to its side. A later rise, as after a rebalance,
 * does not undo a crossing. Checks at age 0 are left out. Throws RangeError for a level outside (0, 1).
 */
export function crossingsOf(checks: readonly PoolCheck[], level = 0.8): Crossings {
  if (!(level > 0 && level < 1)) throw new RangeError('crossingsOf requires a level in (0, 1)');
  const byBank = new Map<string, PoolCheck[]>();
  for (const check of checks) {
    if (!(check.ageYears > 0)) continue;
    const own = byBank.get(check.bank);
    if (own) own.push(check);
    else byBank.set(check.bank, [check]);
  }
  const crossings = [...byBank.values()].flatMap((own): Crossing[] => {
    own.sort((a, b) => a.ageYears - b.ageYears);
    const [{ bank, owner, ageYears: entry }] = own as [PoolCheck, ...PoolCheck[]];
    const below = own.find(({ capacityAh, ratedAh }) => capacityAh / ratedAh < level);
    const right = below?.ageYears ?? Infinity;
    const before = own.findLast(({ ageYears }) => ageYears < right);
    return before ? [{ bank, owner, left: before.ageYears, right, entry }] : [];
  });
  return { crossings, alreadyBelow: byBank.size - crossings.length };
}
