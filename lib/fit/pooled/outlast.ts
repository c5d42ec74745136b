import { multiply, type Basis } from './derived';
import { lnLife } from './fade';
import { basisOf } from './life';
import { mixMoments, type FitComponent } from './mixture';
import { standardNormalCdf } from './normal';
import { at } from './parameters';
import type { PublishedFit, Ranged } from './types';
import type { Use } from './use';

/** Two cell types held against each other at one use. */
export interface Outlast {
  /** Life of the first / life of the second, typical banks of each, with its 90 % range. */
  ratio: Ranged;
  /** Probability that a typical bank of the first outlasts one of the second, 0..1. */
  probability: number;
}

/**
 * Which of two cell types lasts longer at a use: ln T80 of one less that of the other, by the delta method over what they
 * share (psi) and what each has of its own (m, independent given psi), mixed over exponents (README equations 17 to 19).
 * @throws RangeError on a cell type the fit does not know, or a cell type held against itself
 */
export function outlast(fit: PublishedFit, use: Use, first: string, second: string): Outlast {
  if (first === second) throw new RangeError('outlast requires two different cell types');
  const bases = [basisOf(fit, first), basisOf(fit, second)] as const;
  const { mean, variance } = mixMoments(
    fit.components.map((component) => {
      const [one, two] = bases.map((basis) => lifeOf(component, use, basis)) as [Part, Part];
      const gradient = one.gradient.map((value, i) => value - two.gradient[i]!);
      const moved = multiply(component.covariance, gradient);
      const shared = gradient.reduce((sum, value, i) => sum + value * moved[i]!, 0);
      return {
        weight: component.weight,
        mean: one.lnYears - two.lnYears,
        variance: shared + one.ownVariance + two.ownVariance,
      };
    }),
  );
  const se = Math.sqrt(variance);
  return {
    ratio: {
      estimate: Math.exp(mean),
      lower: Math.exp(mean - fit.tQuantile * se),
      upper: Math.exp(mean + fit.tQuantile * se),
    },
    probability: standardNormalCdf(mean / se),
  };
}

interface Part {
  lnYears: number;
  /** Over psi, with what moves the cell type's effect along. */
  gradient: number[];
  ownVariance: number;
}

function lifeOf(component: FitComponent, use: Use, basis: Basis): Part {
  const effect = basis.kind === 'cellType' ? component.cellTypes[basis.index] : undefined;
  const { psi, exponent } = component;
  const life = lnLife({ psi, exponent, shift: effect?.m ?? 0 }, use);
  const variance = effect?.variance ?? Math.exp(2 * psi[at.lnSm]!);
  return {
    lnYears: life.lnYears,
    gradient: Array.from(life.gradient, (value, i) => value + life.shiftSlope * (effect?.slope[i] ?? 0)),
    ownVariance: life.shiftSlope ** 2 * variance,
  };
}
