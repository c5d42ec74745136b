import { studentTQuantile } from '../distributions';
import { CENTRE_EFC, efcToEndOfLife, END_OF_LIFE_FADE, fitPowerLaw } from './powerLaw';
import { statusAt } from './status';
import type { CurveRefusal, LifeStatus, RangedFigure } from './types';

/** One check of one bank: capacity as a fraction of rated (or of its own start) capacity. */
export interface SeriesPoint {
  /** Equivalent full cycles since new, above 0. */
  efc: number;
  capacityFraction: number;
  /** Relative standard deviation; equal weights when left out everywhere. */
  relSd?: number;
}

export interface SeriesFit {
  ok: true;
  /** Fade at 500 EFC, and exponent, each with its range. */
  k: RangedFigure;
  z: RangedFigure;
  /** Covariance of k and z, in this order. */
  covariance: number[][];
  zBound: 'lower' | 'upper' | null;
  /** Scatter of the checks about the curve, relative to relSd where given. */
  residualSd: number;
  degreesOfFreedom: number;
  /** The last check. */
  lastEfc: number;
  efcTo80: RangedFigure;
  seLnEfcTo80: number;
  /** Against the last check: one bank is its own reach. */
  status: LifeStatus;
}

/**
 * The power law q = k (efc/500)^z of one bank alone, with ranges from its own scatter: k and z by Student's t
 * on their standard errors, EFC to 80 % by the delta method on its logarithm. Needs four checks.
 *
 * `confidence` is 0.9 by default. Throws RangeError on values that are not finite or efc of 0 or less.
 */
export function fitSeries(points: readonly SeriesPoint[], confidence = 0.9): SeriesFit | CurveRefusal {
  if (!(confidence > 0 && confidence < 1)) throw new RangeError('fitSeries requires a confidence in (0, 1)');
  if (!points.every(isUsable)) throw new RangeError('fitSeries requires finite points with efc above 0');
  if (points.length < 4) return { ok: false, reason: 'tooFewChecks' };
  const found = fitPowerLaw({
    logEfc: Float64Array.from(points, ({ efc }) => Math.log(efc / CENTRE_EFC)),
    fade: Float64Array.from(points, ({ capacityFraction }) => 1 - capacityFraction),
    sd: Float64Array.from(points, ({ relSd }) => relSd ?? 1),
  });
  if (!found.ok) return found;
  const { k, z, covariance, zBound, residualSd, degreesOfFreedom } = found;
  const t = studentTQuantile(0.5 + confidence / 2, degreesOfFreedom);
  const efcTo80 = efcToEndOfLife(found);
  // ln N = ln 500 + ln(0.2 / k) / z
  const gradient = [-1 / (k * z), -Math.log(END_OF_LIFE_FADE / k) / z ** 2] as const;
  const seLnEfcTo80 = Math.sqrt(quadraticForm(covariance, gradient));
  const lastEfc = Math.max(...points.map(({ efc }) => efc));
  const around = (estimate: number, variance: number): RangedFigure => {
    const half = t * Math.sqrt(variance);
    return { estimate, lower: estimate - half, upper: estimate + half };
  };
  return {
    ok: true,
    k: around(k, quadraticForm(covariance, [1, 0])),
    z: around(z, quadraticForm(covariance, [0, 1])),
    covariance,
    zBound,
    residualSd,
    degreesOfFreedom,
    lastEfc,
    efcTo80: {
      estimate: efcTo80,
      lower: efcTo80 * Math.exp(-t * seLnEfcTo80),
      upper: efcTo80 * Math.exp(t * seLnEfcTo80),
    },
    seLnEfcTo80,
    status: statusAt(efcTo80, lastEfc),
  };
}

const isUsable = ({ efc, capacityFraction, relSd = 1 }: SeriesPoint) =>
  efc > 0 && relSd > 0 && [efc, capacityFraction, relSd].every(Number.isFinite);

function quadraticForm(covariance: number[][], [a, b]: readonly [number, number]): number {
  const [[kk, kz], [, zz]] = covariance as [[number, number], [number, number]];
  return a * a * kk + 2 * a * b * kz + b * b * zz;
}
