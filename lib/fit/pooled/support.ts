import type { OutsidePool, PooledLifeStatus, Reach } from './types';
import type { Use } from './use';

/** Fewer banks than this, or fewer owners, and a cell type is shown with the pool's figure. */
export const minBanks = 10;
export const minOwners = 5;
/** Over this prior share nothing is measured yet; over the other, a figure leans on published studies. */
export const notMeasuredShare = 0.5;
export const leansShare = 0.25;

/** Years up to which a use is measured: the nearer of years and full cycles. */
export function reachOfUse(reach: { years: number; efc: number }, use: Use): number {
  return Math.min(reach.years, use.efcPerYear > 0 ? reach.efc / use.efcPerYear : Infinity);
}

/** Within reach measured, to twice projected, to three times extrapolated, further beyond. */
export function statusOf(years: number, reach: number): PooledLifeStatus {
  if (years <= reach) return 'measured';
  if (years <= 2 * reach) return 'projected';
  return years <= 3 * reach ? 'extrapolated' : 'beyond';
}

/** What a prior share allows to say. */
export function supportOf(priorShare: number): 'shown' | 'leans' | 'notMeasured' {
  if (priorShare > notMeasuredShare) return 'notMeasured';
  return priorShare > leansShare ? 'leans' : 'shown';
}

// Means of equal values differ in their last digits.
const slack = 1e-9;

/** Conditions of a use outside the middle 95 % of the pool's, each with the nearest value the pool supports. */
export function outsideOf(reach: Reach, use: Use): OutsidePool[] {
  const outside: OutsidePool[] = [];
  for (const { condition, from, to } of reach.conditions) {
    const value = use[condition];
    const margin = slack * Math.max(1, Math.abs(value));
    if (value < from - margin || value > to + margin)
      outside.push({ condition, value, nearest: value < from ? from : to });
  }
  const alike = use.isClamped ? reach.clampedBanks : reach.unclampedBanks;
  if (alike === 0) outside.push({ condition: 'isClamped', value: use.isClamped, nearest: !use.isClamped });
  return outside;
}
