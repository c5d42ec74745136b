import type { FitComponent } from './mixture';
import { multiply } from './derived';
import { fadePoint, lnKept } from './fade';
import { hermiteRule } from './hermite';
import { basisOf, type LifeOptions } from './life';
import { solveRising, standardNormalCdf } from './normal';
import { at, referenceRelSd } from './parameters';
import type { PublishedFit, Ranged } from './types';
import type { Use } from './use';

const rule = hermiteRule(15);
const weights = rule.nodes.map((x, k) =>
  Math.exp(rule.logWeights[k]! - 0.5 * x * x - 0.5 * Math.log(2 * Math.PI)),
);

/**
 * Where 90 % of single checks of new banks would fall, share of the rating: parameters, cell type, bank and
 * instrument all unknown. ln q is integrated over its whole spread, what is left is normal (README equation 21).
 * @param relSd relative sd of the check
 */
export function predictNewCheck(
  fit: PublishedFit,
  use: Use,
  years: number,
  relSd: number,
  options: LifeOptions & { level?: number } = {},
): Ranged {
  const tail = (1 - (options.level ?? 0.9)) / 2;
  const [lower, estimate, upper] = checkQuantiles(fit, use, years, relSd, {
    ...options,
    probabilities: [tail, 0.5, 1 - tail],
  });
  return { estimate: estimate!, lower: lower!, upper: upper! };
}

/** Quantiles of the same, in the order of their probabilities. */
export function checkQuantiles(
  fit: PublishedFit,
  use: Use,
  years: number,
  relSd: number,
  options: LifeOptions & { probabilities: readonly number[] },
): number[] {
  const parts = fit.components.map((component) => spreadOfCheck(fit, component, use, years, relSd, options));
  const probability = (lnShare: number) => {
    let sum = 0;
    for (const part of parts) {
      for (let k = 0; k < weights.length; k++) {
        sum += part.weight * weights[k]! * standardNormalCdf((lnShare - part.means[k]!) / part.sd);
      }
    }
    return sum;
  };
  return options.probabilities.map((level) => Math.exp(solveRising(probability, level, -4, 1)));
}

function spreadOfCheck(
  fit: PublishedFit,
  component: FitComponent,
  use: Use,
  years: number,
  relSd: number,
  options: LifeOptions,
): { weight: number; means: Float64Array; sd: number } {
  const { psi, exponent, covariance } = component;
  const basis = basisOf(fit, options.cellType);
  const effect = basis.kind === 'cellType' ? component.cellTypes[basis.index]! : undefined;
  const point = fadePoint({ psi, exponent, shift: effect?.m ?? 0 }, use, years);
  const slope = Array.from(point.slope, (value, i) => value + (effect?.slope[i] ?? 0));
  const moved = multiply(covariance, slope);
  const fromParameters = slope.reduce((sum, value, i) => sum + value * moved[i]!, 0);
  const variance = (place: number) =>
    Math.exp(2 * psi[place]! + 2 * Math.min(1, covariance[place * psi.length + place]!));
  const paceVariance = fromParameters + variance(at.lnSu) + (effect?.variance ?? variance(at.lnSm));
  const paceSd = Math.sqrt(paceVariance);
  // c0 and ln q are correlated: regress the first on the second.
  const withPace = moved[at.c0]! / paceVariance;
  const startVariance = covariance[0]! - withPace * moved[at.c0]!;
  const sd = Math.sqrt(startVariance + variance(at.lnSc) + variance(at.lnS) * (relSd / referenceRelSd) ** 2);
  const means = rule.nodes.map((x) => {
    const away = paceSd * x;
    return psi[at.c0]! + withPace * away + lnKept(Math.exp(point.lnFade + away));
  });
  return { weight: component.weight, means, sd };
}
