import { quantile } from 'simple-statistics';
import type { PoolCheck } from '../poolCheck';
import { bootstrapBanks, percentileRange, type BankSeries } from './bootstrapBanks';
import { CENTRE_EFC, efcToEndOfLife, fadeAt, fitPowerLaw, type PowerLaw } from './powerLaw';
import { statusAt } from './status';
import type { CurvePoint, CurveResult, RangedFigure } from './types';

export interface FitCurveOptions {
  /** Of the resampling of banks. */
  seed: number;
  /** Resamples of banks; default 200. */
  bootstrap?: number;
  /** Owners needed before any number is given; default 5. */
  minOwners?: number;
}

/** Steps of the curve from 0 to three times the reach: a multiple of three. */
const GRID_STEPS = 60;
const MIN_CHECKS = 6;
const MIN_BANKS = 2;
// With less spread of EFC than this the exponent is a guess.
const MIN_EFC_RATIO = 1.5;
const DEFAULT_RESAMPLES = 200;
const DEFAULT_MIN_OWNERS = 5;

/**
 * Power law of fade q = k (efc/500)^z over one group of checks, each weighted by 1/relSd^2, with 90 %
 * ranges from resampling whole banks. Every bank starts at its rated capacity here: differences of
 * start capacity are part of the spread between banks.
 *
 * `checks`: any order; checks at 0 EFC say nothing about k and z and are left out. The result does
 * not depend on the order of the checks. Returns `{ ok: false, reason }` for too few owners or
 * checks, too little spread of EFC, no measurable fade, or a search that did not settle. Throws
 * RangeError on values that are not finite, or not positive where they must be.
 */
export function fitCurve(checks: readonly PoolCheck[], options: FitCurveOptions): CurveResult {
  const { bootstrap = DEFAULT_RESAMPLES, minOwners = DEFAULT_MIN_OWNERS } = options;
  if (!(bootstrap >= 1)) throw new RangeError('fitCurve requires at least one resample');
  checks.forEach(assertUsable);
  const used = inOrder(checks.filter((check) => check.efc > 0));
  const owners = new Set(used.map((check) => check.owner)).size;
  if (owners < minOwners) return { ok: false, reason: 'tooFewOwners' };
  const series = toSeries(used);
  if (used.length < MIN_CHECKS || series.bankCount < MIN_BANKS) return { ok: false, reason: 'tooFewChecks' };
  const efcs = used.map((check) => check.efc);
  if (Math.max(...efcs) / Math.min(...efcs) < MIN_EFC_RATIO) return { ok: false, reason: 'tooLittleSpread' };
  const best = fitPowerLaw(series);
  if (!best.ok) return best;

  const draws = bootstrapBanks(series, best, { seed: options.seed, resamples: bootstrap });
  const ranged = (figure: (law: PowerLaw) => number): RangedFigure =>
    percentileRange(Float64Array.from(draws, figure), figure(best), series.bankCount);
  const reach = {
    efc: quantile(efcs, 0.95),
    years: quantile(
      used.map((check) => check.ageYears),
      0.95,
    ),
  };
  const efcTo80 = ranged(efcToEndOfLife);
  return {
    ok: true,
    k: ranged((law) => law.k),
    z: ranged((law) => law.z),
    zBound: best.zBound,
    owners,
    banks: series.bankCount,
    checks: used.length,
    reach,
    efcPerYear: meanEfcPerYear(used),
    capacityAtReach: ranged((law) => 1 - fadeAt(law, reach.efc)),
    efcTo80,
    status: statusAt(efcTo80.estimate, reach.efc),
    points: curvePoints(ranged, reach.efc),
    resamples: bootstrap,
  };
}

function curvePoints(
  ranged: (figure: (law: PowerLaw) => number) => RangedFigure,
  reachEfc: number,
): CurvePoint[] {
  return Array.from({ length: GRID_STEPS + 1 }, (_, step) => {
    const efc = (3 * reachEfc * step) / GRID_STEPS;
    const { estimate, lower, upper } = ranged((law) => Math.max(1 - fadeAt(law, efc), 0));
    // The grid's multiples of the reach must not lose their status to rounding.
    const status = statusAt(step, GRID_STEPS / 3);
    return { efc, capacityFraction: estimate, lower, upper, status };
  });
}

function assertUsable(check: PoolCheck): void {
  const { efc, ageYears, ratedAh, capacityAh, relSd } = check;
  const isUsable =
    [ratedAh, capacityAh, relSd].every((value) => value > 0 && Number.isFinite(value)) &&
    [efc, ageYears].every((value) => value >= 0 && Number.isFinite(value));
  if (!isUsable) throw new RangeError('fitCurve requires finite checks with positive capacities and relSd');
}

// A fixed order, so that a seed means the same draws however the rows arrive.
function inOrder(checks: PoolCheck[]): PoolCheck[] {
  return checks.sort((a, b) =>
    a.bank === b.bank ? a.ageYears - b.ageYears || a.efc - b.efc : a.bank < b.bank ? -1 : 1,
  );
}

function toSeries(checks: readonly PoolCheck[]): BankSeries {
  const numbers = new Map<string, number>();
  const bankOf = Int32Array.from(checks, ({ bank }) => {
    if (!numbers.has(bank)) numbers.set(bank, numbers.size);
    return numbers.get(bank) as number;
  });
  return {
    logEfc: Float64Array.from(checks, ({ efc }) => Math.log(efc / CENTRE_EFC)),
    fade: Float64Array.from(checks, ({ capacityAh, ratedAh }) => 1 - capacityAh / ratedAh),
    sd: Float64Array.from(checks, ({ relSd }) => relSd),
    bankOf,
    bankCount: numbers.size,
  };
}

function meanEfcPerYear(checks: readonly PoolCheck[]): number {
  const lastOfBank = new Map<string, PoolCheck>();
  for (const check of checks) if (check.ageYears > 0) lastOfBank.set(check.bank, check);
  let sum = 0;
  for (const { efc, ageYears } of lastOfBank.values()) sum += efc / ageYears;
  return lastOfBank.size > 0 ? sum / lastOfBank.size : 0;
}
