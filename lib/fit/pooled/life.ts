import { bankRange } from './bankRange';
import { derive, type Basis } from './derived';
import { fadePoint, lnKept, lnLife } from './fade';
import { at, endOfLifeShare } from './parameters';
import { minBanks, minOwners, outsideOf, reachOfUse, statusOf, supportOf } from './support';
import type { PooledLife, PublishedFit, Ranged } from './types';
import type { Use } from './use';

/** Whose fade or life is asked for. */
export interface LifeOptions {
  /** A cell type of the fit; without it, the average one. */
  cellType?: string;
  /** End of life as a share of the rating (default 0.8). */
  share?: number;
}

/**
 * Fade q (share of the start capacity lost) of a use after some years, with its 90 % range.
 * @throws RangeError when years is not positive or the use has no physical sense
 */
export function fadeAt(fit: PublishedFit, use: Use, years: number, options: LifeOptions = {}): Ranged {
  requireUse(use);
  if (!(years > 0) || !Number.isFinite(years)) throw new RangeError('fadeAt requires years above 0');
  const { mean, se } = derive(fit, basisOf(fit, options.cellType), ({ psi, exponent }, shift) => {
    const point = fadePoint({ psi, exponent, shift }, use, years);
    return { value: point.lnFade, gradient: point.slope, shiftSlope: 1 };
  });
  return onLogScale(mean, se, fit.tQuantile);
}

/**
 * Capacity left of a use after some years, share of the rating (e^c0 (1 - q)), with its 90 % range. The range is
 * taken on the scale of its logarithm.
 */
export function capacityAt(fit: PublishedFit, use: Use, years: number, options: LifeOptions = {}): Ranged {
  requireUse(use);
  if (!(years > 0) || !Number.isFinite(years)) throw new RangeError('capacityAt requires years above 0');
  const { mean, se } = derive(fit, basisOf(fit, options.cellType), ({ psi, exponent }, shift) => {
    const point = fadePoint({ psi, exponent, shift }, use, years);
    const derivative = -Math.min(point.fade / (1 - Math.min(point.fade, 0.9)), 9);
    const gradient = point.slope.map((slope) => derivative * slope);
    gradient[at.c0] = 1;
    return { value: psi[at.c0]! + lnKept(point.fade), gradient, shiftSlope: derivative };
  });
  return onLogScale(mean, se, fit.tQuantile);
}

/**
 * Life of a use: years and full cycles to 80 % of the rating with their 90 % ranges, the range of banks, the reach,
 * the capacity left at reach and the status (README equations 18 to 20).
 * @throws RangeError on a use without physical sense or a cell type the fit does not know
 */
export function lifeAt(fit: PublishedFit, use: Use, options: LifeOptions = {}): PooledLife {
  requireUse(use);
  const basis = basisOf(fit, options.cellType);
  const share = options.share ?? endOfLifeShare;
  const { mean, se, priorShare } = derive(fit, basis, ({ psi, exponent }, shift) => {
    const life = lnLife({ psi, exponent, shift }, use, share);
    return { value: life.lnYears, gradient: life.gradient, shiftSlope: life.shiftSlope };
  });
  const years = onLogScale(mean, se, fit.tQuantile);
  const [lower, upper] = bankRange(fit.components, use, basis, { share });
  const row = basis.kind === 'cellType' ? fit.cellTypes[basis.index]! : undefined;
  const reach = reachOfUse(row ? row.reach : fit.reach, use);
  const inEfc = (value: number) => value * use.efcPerYear;
  return {
    lnT80: { estimate: mean, se },
    years,
    efc: { estimate: inEfc(years.estimate), lower: inEfc(years.lower), upper: inEfc(years.upper) },
    rangeOfBanks: { lower: lower!, upper: upper! },
    rangeOfBanksEfc: { lower: inEfc(lower!), upper: inEfc(upper!) },
    fadeAt8y: fadeAt(fit, use, 8, options),
    reach,
    capacityAtReach: capacityAt(fit, use, Math.max(reach, 1e-3), options),
    status: statusOf(years.estimate, reach),
    priorShare,
    support: supportOf(priorShare),
    basis: basis.kind,
    outside: outsideOf(fit.reach, use),
  };
}

/** The cell type's own effect when enough banks and owners stand behind it, else the pool's spread. */
export function basisOf(fit: PublishedFit, cellType: string | undefined): Basis {
  if (cellType === undefined) return { kind: 'average' };
  const index = fit.cellTypes.findIndex((row) => row.cellType === cellType);
  const row = fit.cellTypes[index];
  if (!row) throw new RangeError(`the fit has no cell type "${cellType}"`);
  return row.banks >= minBanks && row.owners >= minOwners ? { kind: 'cellType', index } : { kind: 'pool' };
}

function onLogScale(mean: number, se: number, quantile: number): Ranged {
  return {
    estimate: Math.exp(mean),
    lower: Math.exp(mean - quantile * se),
    upper: Math.exp(mean + quantile * se),
  };
}

function requireUse(use: Use): void {
  const { depthFraction, dischargeIt, temperatureC, socMeanFraction, efcPerYear } = use;
  const isSound =
    depthFraction > 0 &&
    depthFraction <= 1 &&
    dischargeIt > 0 &&
    dischargeIt <= 10 &&
    temperatureC > -60 &&
    temperatureC < 100 &&
    socMeanFraction >= 0 &&
    socMeanFraction <= 1 &&
    efcPerYear >= 0 &&
    efcPerYear <= 10_000;
  if (!isSound)
    throw new RangeError(
      'a use requires a depth, rate, temperature, state of charge and full cycles within physical limits',
    );
}
