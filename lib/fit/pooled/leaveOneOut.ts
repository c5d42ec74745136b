import { fillGrossInto } from './bankNodes';
import { at, tangentFade } from './parameters';
import type { PoolTable } from './table';

/** What predicting a check from its bank's others needs of a fit. */
export interface PredictionFit {
  psi: Float64Array;
  exponent: number;
  /** Per cell type of the table: effect and its variance given psi. */
  effects: { m: number; variance: number }[];
}

/** Predictions of single checks from a bank's other checks. */
export interface Predictor {
  /**
   * @param row the check predicted
   * @param isTaken whether another row of the bank may be used
   */
  predict(
    row: number,
    first: number,
    end: number,
    cellType: number,
    isTaken: (row: number) => boolean,
  ): Prediction;
}

/** A predicted ln(capacity / rated). */
export interface Prediction {
  mean: number;
  /** Variance of the mean: start and pace of the bank, and the cell type's effect. */
  variance: number;
  /** Variance of the check's own error, s² w. */
  noise: number;
  /** (seen - mean) / sqrt(variance + noise). */
  t: number;
  /** ln of the predictive density, up to a constant. */
  lnDensity: number;
}

const maxSteps = 30;
const stepCap = 0.5;

/**
 * Predictor of checks: posterior mode and 2 x 2 covariance of a bank's start c and pace u from its other checks; the
 * population when there is none (README equation 24). The spread of m is added to that of u.
 */
export function createPredictor(table: PoolTable, fit: PredictionFit): Predictor {
  const { psi, exponent, effects } = fit;
  const gross = new Float64Array(table.rows);
  fillGrossInto(table, psi, exponent, gross, null);
  const s2 = Math.exp(2 * psi[at.lnS]!);
  const sc2 = Math.exp(2 * psi[at.lnSc]!);
  const su2 = Math.exp(2 * psi[at.lnSu]!);
  const rho = sc2 / s2;
  const c0 = psi[at.c0]!;
  return { predict };

  function predict(
    row: number,
    first: number,
    end: number,
    cellType: number,
    isTaken: (row: number) => boolean,
  ): Prediction {
    const { m, variance: effectVariance } = effects[cellType]!;
    const paceVariance = su2 + effectVariance;
    let u = 0;
    let sums = bankSums(row, first, end, isTaken, m + u);
    // As in the fit itself: c in closed form, Gauss-Newton on u alone.
    for (let step = 0; step < maxSteps && sums.a > 0; step++) {
      const kappa = rho / (1 + rho * sums.a);
      const gradient = (sums.rd - kappa * sums.r * sums.d) / s2 - u / paceVariance;
      const gaussNewton = (sums.dd - kappa * sums.d * sums.d) / s2 + 1 / paceVariance;
      const full = gaussNewton - (sums.rBend - kappa * sums.r * sums.bend) / s2;
      const move = gradient / (full > 0.5 * gaussNewton ? full : gaussNewton);
      u += Math.max(-stepCap, Math.min(stepCap, move));
      sums = bankSums(row, first, end, isTaken, m + u);
      if (Math.abs(move) < 1e-5) break;
    }
    const kappa = rho / (1 + rho * sums.a);
    const c = kappa * sums.r;
    const iCc = sums.a / s2 + 1 / sc2;
    const iCu = sums.d / s2;
    // The bend is kept only as far as the 2 x 2 information stays well positive.
    const gaussNewton = sums.dd / s2 + 1 / paceVariance;
    const bend = (sums.rBend - c * sums.bend) / s2;
    const iUu = Math.max(gaussNewton - bend, (iCu * iCu) / iCc + 0.5 / paceVariance);
    const determinant = iCc * iUu - iCu * iCu;
    const [cc, cu, uu] = [iUu / determinant, -iCu / determinant, iCc / determinant];
    const { kept, slope } = curve(Math.exp(m + u) * gross[row]!);
    const mean = c0 + c + kept;
    const variance = cc + 2 * slope * cu + slope * slope * uu;
    const noise = s2 * table.weight[row]!;
    const t = (table.y[row]! - mean) / Math.sqrt(variance + noise);
    return { mean, variance, noise, t, lnDensity: -0.5 * t * t - 0.5 * Math.log(variance + noise) };
  }

  /** Weighted sums over a bank's taken checks at a pace: a = sum 1/w, r, d, r d, d d, and those of d²ln(1-q)/du². */
  function bankSums(
    row: number,
    first: number,
    end: number,
    isTaken: (row: number) => boolean,
    lnPace: number,
  ) {
    const pace = Math.exp(lnPace);
    const sums = { a: 0, r: 0, d: 0, rd: 0, dd: 0, bend: 0, rBend: 0 };
    for (let j = first; j < end; j++) {
      if (j === row || !isTaken(j)) continue;
      const inverse = 1 / table.weight[j]!;
      const { kept, slope, second } = curve(pace * gross[j]!);
      const r = table.y[j]! - c0 - kept;
      sums.a += inverse;
      sums.r += inverse * r;
      sums.d += inverse * slope;
      sums.rd += inverse * r * slope;
      sums.dd += inverse * slope * slope;
      sums.bend += inverse * second;
      sums.rBend += inverse * r * second;
    }
    return sums;
  }
}

/** ln(1 - q) and its first two derivatives by ln q. */
function curve(q: number): { kept: number; slope: number; second: number } {
  if (q < tangentFade) {
    const slope = -q / (1 - q);
    return { kept: Math.log(1 - q), slope, second: slope - slope * slope };
  }
  const slope = -q / (1 - tangentFade);
  return { kept: Math.log(1 - tangentFade) - (q - tangentFade) / (1 - tangentFade), slope, second: slope };
}
