import { baseParameterCount } from './parameters';

/** One fit at one calendar exponent, as published: all a reader needs to compute lives and their intervals. */
export interface FitComponent {
  exponent: number;
  /** Posterior weight of the exponent; the weights of a fit add to 1. */
  weight: number;
  psi: number[];
  /** Posterior covariance of psi, flat, row by row. */
  covariance: number[];
  /** Effects of the cell types, in the order of the fit's cell types. */
  cellTypes: CellTypeEffect[];
}

/** A cell type's effect m on ln q, with what ties it to psi. */
export interface CellTypeEffect {
  m: number;
  /** Variance of m given psi. */
  variance: number;
  /** dm/dpsi: how the effect moves when psi does. */
  slope: number[];
}

/** Mean and variance of a quantity over components: within plus between (README equation 17). */
export function mixMoments(parts: readonly { weight: number; mean: number; variance: number }[]): {
  mean: number;
  variance: number;
} {
  let mean = 0;
  for (const part of parts) mean += part.weight * part.mean;
  let variance = 0;
  for (const part of parts) variance += part.weight * (part.variance + (part.mean - mean) ** 2);
  return { mean, variance };
}

/** Mean vector and covariance of psi over components. */
export function mixParameters(components: readonly FitComponent[]): {
  psi: number[];
  covariance: number[][];
} {
  const count = components[0]?.psi.length ?? baseParameterCount;
  const psi = Array.from({ length: count }, (_, i) =>
    components.reduce((sum, part) => sum + part.weight * part.psi[i]!, 0),
  );
  const covariance = psi.map((meanI, i) =>
    psi.map((meanJ, j) =>
      components.reduce(
        (sum, part) =>
          sum +
          part.weight * (part.covariance[i * count + j]! + (part.psi[i]! - meanI) * (part.psi[j]! - meanJ)),
        0,
      ),
    ),
  );
  return { psi, covariance };
}
