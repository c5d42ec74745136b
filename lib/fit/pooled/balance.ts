import { mean, variance } from 'simple-statistics';
import type { PoolCheck } from '../poolCheck';

/** One condition among clamped and unclamped banks. */
export interface BalanceRow {
  condition: 'depthFraction' | 'dischargeIt' | 'temperatureC' | 'socMeanFraction' | 'ageYears' | 'efcPerYear';
  clampedMean: number | null;
  unclampedMean: number | null;
  /** Difference of means over the pooled sd; null where it can't be told. Beyond 0.25 the two differ notably. */
  standardisedDifference: number | null;
}

const valueOf: Record<BalanceRow['condition'], (check: PoolCheck) => number> = {
  depthFraction: (check) => check.depthFraction,
  dischargeIt: (check) => check.dischargeIt,
  temperatureC: (check) => check.temperatureC,
  socMeanFraction: (check) => check.socMeanFraction,
  ageYears: (check) => check.ageYears,
  efcPerYear: (check) => check.efc / check.ageYears,
};

/** How alike clamped and unclamped banks are otherwise, one voice per bank (its latest check). */
export function covariateBalance(checks: readonly PoolCheck[]): BalanceRow[] {
  const latest = new Map<string, PoolCheck>();
  for (const check of checks) {
    const known = latest.get(check.bank);
    if (!known || check.ageYears >= known.ageYears) latest.set(check.bank, check);
  }
  const banks = [...latest.values()];
  return (Object.keys(valueOf) as BalanceRow['condition'][]).map((condition) => {
    const values = (isClamped: boolean) =>
      banks.filter((check) => check.isClamped === isClamped).map(valueOf[condition]);
    const [clamped, unclamped] = [values(true), values(false)];
    const sd = Math.sqrt((varianceOr0(clamped) + varianceOr0(unclamped)) / 2);
    const isKnown = clamped.length > 0 && unclamped.length > 0 && sd > 0;
    return {
      condition,
      clampedMean: clamped.length > 0 ? mean(clamped) : null,
      unclampedMean: unclamped.length > 0 ? mean(unclamped) : null,
      standardisedDifference: isKnown ? (mean(clamped) - mean(unclamped)) / sd : null,
    };
  });
}

function varianceOr0(values: number[]): number {
  return values.length > 1 ? variance(values) : 0;
}
