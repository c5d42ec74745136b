import type { PoolCheck } from '../poolCheck';
import type { ConditionName, Reach } from './types';

const reachQuantile = 0.95;

const conditionOf: Record<ConditionName, (check: PoolCheck) => number> = {
  depthFraction: (check) => check.depthFraction,
  dischargeIt: (check) => check.dischargeIt,
  temperatureC: (check) => check.temperatureC,
  socMeanFraction: (check) => check.socMeanFraction,
  efcPerYear: (check) => check.efc / check.ageYears,
};

/** Quantile of unsorted numbers (type 7). */
export function quantileOf(values: readonly number[], probability: number): number {
  if (values.length === 0) return 0;
  const sorted = Float64Array.from(values).sort();
  const place = (sorted.length - 1) * probability;
  const below = sorted[Math.floor(place)]!;
  return below + (place - Math.floor(place)) * ((sorted[Math.ceil(place)] ?? below) - below);
}

/** How far a set of checks reaches in years and full cycles: 95 % quantiles. */
export function reachOf(checks: readonly PoolCheck[]): { years: number; efc: number } {
  return {
    years: quantileOf(
      checks.map((check) => check.ageYears),
      reachQuantile,
    ),
    efc: quantileOf(
      checks.map((check) => check.efc),
      reachQuantile,
    ),
  };
}

/** Reach of the pool with the middle 95 % of each condition, one voice per bank (its latest check). */
export function poolReach(checks: readonly PoolCheck[]): Reach {
  const latest = new Map<string, PoolCheck>();
  for (const check of checks) {
    const known = latest.get(check.bank);
    if (!known || check.ageYears >= known.ageYears) latest.set(check.bank, check);
  }
  const conditions = (Object.keys(conditionOf) as ConditionName[]).map((condition) => {
    const values = [...latest.values()].map(conditionOf[condition]);
    return { condition, from: quantileOf(values, 0.025), to: quantileOf(values, 0.975) };
  });
  const banks = (isClamped: boolean) =>
    [...latest.values()].filter((check) => check.isClamped === isClamped).length;
  return { ...reachOf(checks), conditions, clampedBanks: banks(true), unclampedBanks: banks(false) };
}
