import type { Evaluation } from './evaluate';
import type { FitComponent } from './mixture';
import type { Maximum } from './maximise';
import { maximise } from './maximise';
import { exponentPrior, type Prior } from './priors';
import type { PoolTable } from './table';
import type { Centres } from './workspace';

/** A component with the pieces later steps start from. */
export interface ComponentFit {
  component: FitComponent;
  evaluation: Evaluation;
  centres: Centres;
  iterations: number;
}

/** Options of a fit over exponents. */
export interface ComponentOptions {
  priors: readonly Prior[];
  /** Fix the calendar exponent; default: mixed over its prior. */
  exponent?: number;
  /** A fit to start from. */
  start?: { psi: ArrayLike<number>; centres?: Centres };
  shouldStop?: () => boolean;
}

export type Components = { ok: true; fits: ComponentFit[] } | Extract<Maximum, { ok: false }>;

/**
 * Fit at each calendar exponent (warm from the middle one) and weigh them: weight ∝ prior weight x exp(objective)
 * (README equation 16).
 */
export function fitComponents(table: PoolTable, options: ComponentOptions): Components {
  const grid = options.exponent === undefined ? exponentPrior : [{ exponent: options.exponent, weight: 1 }];
  const order = [...grid.keys()].sort((a, b) => distance(grid[a]!.exponent) - distance(grid[b]!.exponent));
  const fits: ComponentFit[] = new Array<ComponentFit>(grid.length);
  const done: number[] = [];
  for (const place of order) {
    const nearest = done.reduce<number | undefined>(
      (best, other) =>
        best === undefined || Math.abs(other - place) < Math.abs(best - place) ? other : best,
      undefined,
    );
    const from = nearest === undefined ? undefined : fits[nearest]!;
    const result = maximise(table, {
      exponent: grid[place]!.exponent,
      priors: options.priors,
      start: from ? from.evaluation.psi : options.start?.psi,
      centres: from ? from.centres : options.start?.centres,
      shouldStop: options.shouldStop,
    });
    if (!result.ok) return result;
    fits[place] = toComponent(result, grid[place]!.exponent);
    done.push(place);
  }
  weigh(fits, grid);
  return { ok: true, fits };
}

function distance(exponent: number): number {
  return Math.abs(exponent - 0.5);
}

function weigh(fits: ComponentFit[], grid: readonly { weight: number }[]): void {
  const best = Math.max(...fits.map((fit) => fit.evaluation.objective));
  const raw = fits.map((fit, i) => grid[i]!.weight * Math.exp(fit.evaluation.objective - best));
  const total = raw.reduce((sum, weight) => sum + weight, 0);
  fits.forEach((fit, i) => (fit.component.weight = raw[i]! / total));
}

function toComponent(maximum: Extract<Maximum, { ok: true }>, exponent: number): ComponentFit {
  const { evaluation, covariance, centres, iterations } = maximum;
  const count = evaluation.psi.length;
  const cellTypes = Array.from(evaluation.cellTypeMean, (m, k) => {
    const information = evaluation.cellTypeInformation[k]!;
    const cross = evaluation.cellTypeCross.subarray(k * count, (k + 1) * count);
    return { m, variance: 1 / information, slope: Array.from(cross, (value) => -value / information) };
  });
  return {
    component: {
      ...{ exponent, weight: 1 },
      psi: Array.from(evaluation.psi),
      covariance: Array.from(covariance),
      cellTypes,
    },
    ...{ evaluation, centres, iterations },
  };
}

/** The fit at the exponent that weighs most. */
export function heaviestOf<T extends { component: FitComponent }>(fits: readonly T[]): T {
  return fits.reduce((best, fit) => (fit.component.weight > best.component.weight ? fit : best));
}
