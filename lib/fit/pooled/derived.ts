import { mixMoments, type FitComponent } from './mixture';
import { at } from './parameters';
import type { PublishedFit } from './types';

/** A quantity at one component: its value, its gradient over psi and by the cell type's effect m. */
export interface Derived {
  value: number;
  gradient: ArrayLike<number>;
  shiftSlope?: number;
}

/** Which cell type's effect enters a quantity: a named one, the average one, or any (its spread added). */
export type Basis = { kind: 'cellType'; index: number } | { kind: 'average' } | { kind: 'pool' };

/** Mean, standard error and prior share of a quantity, mixed over exponents. */
export interface DerivedEstimate {
  mean: number;
  se: number;
  /** 0: all from the pool, 1: all from the prior. */
  priorShare: number;
}

/**
 * Delta method per component, then mixed: variance g'Vg (+ the cell type's), share g'VPVg / g'Vg
 * (README equations 17 and 19).
 */
export function derive(
  fit: Pick<PublishedFit, 'components' | 'priors'>,
  basis: Basis,
  quantity: (component: FitComponent, shift: number) => Derived,
): DerivedEstimate {
  const precision = fit.priors.map((prior) => 1 / (prior.sd * prior.sd));
  let priorShare = 0;
  const parts = fit.components.map((component) => {
    const effect = basis.kind === 'cellType' ? component.cellTypes[basis.index] : undefined;
    const { value, gradient, shiftSlope = 0 } = quantity(component, effect?.m ?? 0);
    const total = Array.from(gradient, (g, i) => g + shiftSlope * (effect?.slope[i] ?? 0));
    const moved = multiply(component.covariance, total);
    let variance = 0;
    let fromPrior = 0;
    total.forEach((g, i) => {
      variance += g * moved[i]!;
      fromPrior += moved[i]! * moved[i]! * (precision[i] ?? 0);
    });
    priorShare += component.weight * (variance > 0 ? Math.min(1, fromPrior / variance) : 1);
    const effectVariance =
      effect?.variance ?? (basis.kind === 'pool' ? Math.exp(2 * component.psi[at.lnSm]!) : 0);
    return { weight: component.weight, mean: value, variance: variance + shiftSlope ** 2 * effectVariance };
  });
  const { mean, variance } = mixMoments(parts);
  return { mean, se: Math.sqrt(variance), priorShare };
}

/** Flat symmetric matrix times vector. */
export function multiply(flat: ArrayLike<number>, vector: ArrayLike<number>): number[] {
  const size = vector.length;
  return Array.from({ length: size }, (_, i) => {
    let sum = 0;
    for (let j = 0; j < size; j++) sum += flat[i * size + j]! * vector[j]!;
    return sum;
  });
}
