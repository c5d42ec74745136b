import { median } from 'simple-statistics';
import { normalQuantile } from '../distributions';

export interface TheilSenLine {
  ok: true;
  /** Median of the slopes of all pairs with different x. */
  slope: number;
  /** Median of y - slope x. */
  intercept: number;
  slopeLower: number;
  slopeUpper: number;
  pairs: number;
}

/**
 * Straight line through the median of all pairwise slopes, which up to 29 % of wild values cannot carry away,
 * with the interval of Kendall's statistic. Sources: Theil 1950; Sen 1968, J. Amer. Statist. Assoc. 63,
 * 1379-1389 (variance with ties, equation 2.6).
 *
 * Returns `{ ok: false }` for fewer than two different x. Throws RangeError on mismatched lengths, values
 * that are not finite, or a confidence outside (0, 1).
 */
export function theilSen(
  x: readonly number[],
  y: readonly number[],
  confidence = 0.9,
): TheilSenLine | { ok: false; reason: 'oneX' } {
  if (x.length !== y.length) throw new RangeError('theilSen requires as many x as y');
  if (![...x, ...y].every(Number.isFinite)) throw new RangeError('theilSen requires finite values');
  if (!(confidence > 0 && confidence < 1)) throw new RangeError('theilSen requires a confidence in (0, 1)');
  const slopes = pairSlopes(x, y);
  if (slopes.length === 0) return { ok: false, reason: 'oneX' };
  const slope = median(slopes);
  const half = normalQuantile(0.5 + confidence / 2) * Math.sqrt(kendallVariance(x, y));
  // Ranks (N - C)/2 and (N + C)/2 + 1 of the slopes, rounded, counted from 1.
  const lowerRank = Math.max(Math.round((slopes.length - half) / 2), 1);
  const upperRank = Math.min(Math.round((slopes.length + half) / 2) + 1, slopes.length);
  return {
    ok: true,
    slope,
    intercept: median(y.map((value, i) => value - slope * (x[i] as number))),
    slopeLower: slopes[lowerRank - 1] as number,
    slopeUpper: slopes[upperRank - 1] as number,
    pairs: slopes.length,
  };
}

function pairSlopes(x: readonly number[], y: readonly number[]): number[] {
  const slopes: number[] = [];
  for (let i = 0; i < x.length; i++) {
    for (let j = i + 1; j < x.length; j++) {
      const run = (x[j] as number) - (x[i] as number);
      if (run !== 0) slopes.push(((y[j] as number) - (y[i] as number)) / run);
    }
  }
  return slopes.sort((a, b) => a - b);
}

function kendallVariance(x: readonly number[], y: readonly number[]): number {
  const term = (count: number) => count * (count - 1) * (2 * count + 5);
  const ties = (values: readonly number[]) => {
    const counts = new Map<number, number>();
    for (const value of values) counts.set(value, (counts.get(value) ?? 0) + 1);
    return [...counts.values()].reduce((sum, count) => sum + term(count), 0);
  };
  return (term(x.length) - ties(x) - ties(y)) / 18;
}
