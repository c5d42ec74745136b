import { bandsByLever } from '../bands';
import type { PoolCheck } from '../poolCheck';
import { capacityAt } from './life';
import { quantileOf } from './reach';
import type { PublishedFit, Ranged } from './types';
import type { Use } from './use';

/** Raw capacities of a cell of conditions, clamped and not. */
export interface StratifiedCell {
  heat: string;
  rate: string;
  groups: StratifiedGroup[];
}

export interface StratifiedGroup {
  isClamped: boolean;
  banks: number;
  owners: number;
  checks: number;
  /** Per year of age (rounded down): median and 10-90 % of capacity / rating. */
  years: { year: number; banks: number; owners: number; median: number; lower: number; upper: number }[];
  /** Mean conditions of the group, for the model's curve. */
  meanUse: Use;
}

/** Raw points in preset classes of cell temperature x rate, with the group's mean conditions (README section 8a). */
export function stratify(checks: readonly PoolCheck[]): StratifiedCell[] {
  const cells: StratifiedCell[] = [];
  for (const heat of bandsByLever.heat) {
    for (const rate of bandsByLever.rate) {
      const inside = checks.filter((check) => heat.includes(check) && rate.includes(check));
      const groups = [false, true]
        .map((isClamped) => inside.filter((check) => check.isClamped === isClamped))
        .filter((group) => group.length > 0)
        .map(groupOf);
      if (groups.length > 0) cells.push({ heat: heat.key, rate: rate.key, groups });
    }
  }
  return cells;
}

/** The model's capacity left along a group's years, at its mean conditions. */
export function modelCurve(fit: PublishedFit, group: StratifiedGroup, years: readonly number[]): Ranged[] {
  return years.map((at) => capacityAt(fit, group.meanUse, at));
}

function groupOf(checks: readonly PoolCheck[]): StratifiedGroup {
  const byYear = new Map<number, PoolCheck[]>();
  for (const check of checks) {
    const year = Math.floor(check.ageYears);
    const known = byYear.get(year);
    if (known) known.push(check);
    else byYear.set(year, [check]);
  }
  const years = [...byYear.entries()]
    .sort(([a], [b]) => a - b)
    .map(([year, inYear]) => {
      const shares = inYear.map((check) => check.capacityAh / check.ratedAh);
      const at = (probability: number) => quantileOf(shares, probability);
      return { year, ...countsOf(inYear), median: at(0.5), lower: at(0.1), upper: at(0.9) };
    });
  return {
    isClamped: checks[0]!.isClamped,
    ...countsOf(checks),
    checks: checks.length,
    years,
    meanUse: meanUseOf(checks),
  };
}

/** Banks and owners behind a set of checks. */
export function countsOf(checks: readonly PoolCheck[]): { banks: number; owners: number } {
  return {
    banks: new Set(checks.map((check) => check.bank)).size,
    owners: new Set(checks.map((check) => check.owner)).size,
  };
}

/** Mean conditions of a set of checks; clamped as most of them are. */
export function meanUseOf(checks: readonly PoolCheck[]): Use {
  const mean = (value: (check: PoolCheck) => number) =>
    checks.reduce((sum, check) => sum + value(check), 0) / checks.length;
  return {
    depthFraction: mean((check) => check.depthFraction),
    dischargeIt: mean((check) => check.dischargeIt),
    temperatureC: mean((check) => check.temperatureC),
    socMeanFraction: mean((check) => check.socMeanFraction),
    efcPerYear: mean((check) => check.efc / check.ageYears),
    isClamped: mean((check) => (check.isClamped ? 1 : 0)) > 0.5,
  };
}
