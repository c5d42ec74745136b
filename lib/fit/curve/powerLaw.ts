import regression from 'regression';
import { leastSquares } from '../leastSquares';

/** EFC at which the fade k is stated; centring k there takes most of its correlation with z away. */
export const CENTRE_EFC = 500;
/** Fade at the end of life by convention: 80 % of rated capacity left. */
export const END_OF_LIFE_FADE = 0.2;
/**
 * Allowed ranges. Published exponents of lithium iron phosphate cells lie between 0.5 and 1; a curve
 * outside 0.2 to 2 says that the checks do not tell it. k from 0.01 % to 60 % at 500 EFC.
 */
export const K_RANGE = { lower: 1e-4, upper: 0.6 } as const;
export const Z_RANGE = { lower: 0.2, upper: 2 } as const;

/** Checks as the power law sees them; the arrays have equal length. */
export interface FadeSeries {
  /** ln(efc / 500); efc must be above 0. */
  logEfc: Float64Array;
  /** 1 - capacity / rated. */
  fade: Float64Array;
  /** Standard deviation of each fade, up to a common factor. */
  sd: Float64Array;
}

export interface PowerLaw {
  k: number;
  z: number;
}

export interface PowerLawFit extends PowerLaw {
  ok: true;
  zBound: 'lower' | 'upper' | null;
  kBound: 'lower' | 'upper' | null;
  /** Of k and z in this order. */
  covariance: number[][];
  residualSd: number;
  degreesOfFreedom: number;
}

/** Fade after `efc` equivalent full cycles. */
export function fadeAt({ k, z }: PowerLaw, efc: number): number {
  return efc <= 0 ? 0 : k * Math.pow(efc / CENTRE_EFC, z);
}

/** EFC until 80 % of rated capacity is left. */
export function efcToEndOfLife({ k, z }: PowerLaw): number {
  return CENTRE_EFC * Math.pow(END_OF_LIFE_FADE / k, 1 / z);
}

/**
 * Weighted least squares of q = k (efc/500)^z, starting from the straight line through the logarithms.
 * Returns `{ ok: false }` when there is no fade to fit or the search does not settle.
 */
export function fitPowerLaw(
  series: FadeSeries,
): PowerLawFit | { ok: false; reason: 'noFade' | 'notConverged' } {
  const start = startFromLogs(series);
  if (start === null) return { ok: false, reason: 'noFade' };
  const found = leastSquares(
    {
      observed: series.fade,
      sd: series.sd,
      model:
        ([k, z]) =>
        (i) =>
          (k as number) * Math.exp((z as number) * (series.logEfc[i] as number)),
      gradient:
        ([k, z]) =>
        (i) => {
          const logEfc = series.logEfc[i] as number;
          const power = Math.exp((z as number) * logEfc);
          return [power, (k as number) * power * logEfc];
        },
    },
    {
      start: [start.k, start.z],
      lower: [K_RANGE.lower, Z_RANGE.lower],
      upper: [K_RANGE.upper, Z_RANGE.upper],
    },
  );
  if (!found.ok) return { ok: false, reason: 'notConverged' };
  const [k, z] = found.parameters as [number, number];
  const [kBound, zBound] = found.bounds as [PowerLawFit['kBound'], PowerLawFit['zBound']];
  if (kBound === 'lower') return { ok: false, reason: 'noFade' };
  const { covariance, residualSd, degreesOfFreedom } = found;
  return { ok: true, k, z, kBound, zBound, covariance, residualSd, degreesOfFreedom };
}

// Fades of zero or less have no logarithm; they are left to the fit itself.
function startFromLogs(series: FadeSeries): PowerLaw | null {
  const points: [number, number][] = [];
  series.fade.forEach((fade, i) => {
    if (fade > 0) points.push([series.logEfc[i] as number, Math.log(fade)]);
  });
  if (points.length < 2) return null;
  const [slope, intercept] = regression.linear(points, { precision: 12 }).equation as [number, number];
  const z = clamp(slope, 0.3, 1.5);
  const meanLogEfc = points.reduce((sum, point) => sum + point[0], 0) / points.length;
  const k = clamp(Math.exp(intercept + (slope - z) * meanLogEfc), 1e-3, 0.3);
  return { k, z };
}

const clamp = (value: number, lower: number, upper: number) => Math.min(Math.max(value, lower), upper);
