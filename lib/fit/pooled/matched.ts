import { bandsByLever } from '../bands';
import type { PoolCheck } from '../poolCheck';
import { derive } from './derived';
import { fadePoint, lnKept } from './fade';
import { at } from './parameters';
import { z90 } from './normal';
import { meanUseOf } from './stratified';
import type { PublishedFit } from './types';

/** Clamped against unclamped banks of the same conditions and age, without a model. */
export interface MatchedContrast {
  /** Weighted difference of mean ln(capacity / rating), clamped less unclamped; null where no class holds both. */
  lnDifference: number | null;
  lower: number | null;
  upper: number | null;
  /** The same difference as the model has it, over the same classes. */
  modelLnDifference: number | null;
  classes: number;
  banks: { clamped: number; unclamped: number };
}

/**
 * Matched contrast for clamping (README section 8b): within classes of temperature, rate, depth and year of age, the
 * difference of means over banks, weighted by n1 n0 / (n1 + n0). The se counts every bank once over all its years.
 */
export function matchedContrast(checks: readonly PoolCheck[], fit: PublishedFit): MatchedContrast {
  const classes = [...groupByClass(checks).values()].map(splitByClamping).filter((pair) => pair !== null);
  if (classes.length === 0) {
    const none = { lnDifference: null, lower: null, upper: null, modelLnDifference: null };
    return { ...none, classes: 0, banks: { clamped: 0, unclamped: 0 } };
  }
  const totalWeight = classes.reduce((sum, { weight }) => sum + weight, 0);
  const shares = new Map<string, number>();
  let difference = 0;
  let model = 0;
  const seen = { clamped: new Set<string>(), unclamped: new Set<string>() };
  for (const { clamped, unclamped, weight, members } of classes) {
    const share = weight / totalWeight;
    const [meanClamped, meanUnclamped] = [meanOf(clamped), meanOf(unclamped)];
    difference += share * (meanClamped - meanUnclamped);
    model += share * modelDifference(fit, members);
    for (const [bank, value] of clamped) {
      addTo(shares, bank, (share * (value - meanClamped)) / clamped.size);
      seen.clamped.add(bank);
    }
    for (const [bank, value] of unclamped) {
      addTo(shares, bank, (-share * (value - meanUnclamped)) / unclamped.size);
      seen.unclamped.add(bank);
    }
  }
  const se = Math.sqrt([...shares.values()].reduce((sum, part) => sum + part * part, 0));
  return {
    lnDifference: difference,
    ...{ lower: difference - z90 * se, upper: difference + z90 * se, modelLnDifference: model },
    classes: classes.length,
    banks: { clamped: seen.clamped.size, unclamped: seen.unclamped.size },
  };
}

function groupByClass(checks: readonly PoolCheck[]): Map<string, PoolCheck[]> {
  const classes = new Map<string, PoolCheck[]>();
  for (const check of checks) {
    const bands = (['heat', 'rate', 'depth'] as const).map(
      (lever) => bandsByLever[lever].find((band) => band.includes(check))?.key,
    );
    const key = [...bands, Math.floor(check.ageYears)].join('|');
    const known = classes.get(key);
    if (known) known.push(check);
    else classes.set(key, [check]);
  }
  return classes;
}

interface MatchedClass {
  members: PoolCheck[];
  clamped: Map<string, number>;
  unclamped: Map<string, number>;
  weight: number;
}

/** Bank means of a class on either side; null unless both sides have two banks, so that a spread can be seen. */
function splitByClamping(members: PoolCheck[]): MatchedClass | null {
  const side = (isClamped: boolean) => {
    const values = new Map<string, number[]>();
    for (const check of members) {
      if (check.isClamped !== isClamped) continue;
      const known = values.get(check.bank) ?? [];
      values.set(check.bank, [...known, Math.log(check.capacityAh / check.ratedAh)]);
    }
    return new Map([...values].map(([bank, all]) => [bank, all.reduce((a, b) => a + b, 0) / all.length]));
  };
  const [clamped, unclamped] = [side(true), side(false)];
  if (clamped.size < 2 || unclamped.size < 2) return null;
  return {
    members,
    clamped,
    unclamped,
    weight: (clamped.size * unclamped.size) / (clamped.size + unclamped.size),
  };
}

function modelDifference(fit: PublishedFit, members: PoolCheck[]): number {
  const use = meanUseOf(members);
  const years = members.reduce((sum, check) => sum + check.ageYears, 0) / members.length;
  return derive(fit, { kind: 'average' }, ({ psi, exponent }) => {
    const kept = (isClamped: boolean) =>
      psi[at.c0]! + lnKept(fadePoint({ psi, exponent }, { ...use, isClamped }, years).fade);
    return { value: kept(true) - kept(false), gradient: psi.map(() => 0) };
  }).mean;
}

function meanOf(values: Map<string, number>): number {
  let sum = 0;
  for (const value of values.values()) sum += value;
  return sum / values.size;
}

function addTo(sums: Map<string, number>, key: string, value: number): void {
  sums.set(key, (sums.get(key) ?? 0) + value);
}
