import type { FitComponent } from './mixture';
import { multiply, type Basis } from './derived';
import { fadeAtShare, fadePoint } from './fade';
import { hermiteRule } from './hermite';
import { solveRising, standardNormalCdf } from './normal';
import { at } from './parameters';
import type { Use } from './use';

const startRule = hermiteRule(21);
// exp(logWeight) integrates any function; less the density's own exponent it is the plain weight.
const startWeights = startRule.nodes.map((x, k) =>
  Math.exp(startRule.logWeights[k]! - 0.5 * x * x - 0.5 * Math.log(2 * Math.PI)),
);

/** What is let vary in a range of banks. */
export interface BankRangeOptions {
  /** Quantiles asked for (default 10 % and 90 %: 8 of 10 banks). */
  probabilities?: readonly number[];
  /** Leave out what is unknown of the parameters (a plug-in range). */
  isPlugIn?: boolean;
  share?: number;
}

/**
 * Quantiles of the years to 80 % over banks, over the unknown parameters and, unless a cell type is named, over cell
 * types (README equation 20): P(T < t) = mean over c of Phi([ln q(t) - ln q80(c)] / sd), sd² = su² + spread of m +
 * g'Vg. Integrated, not drawn, so that it needs no seed.
 */
export function bankRange(
  components: readonly FitComponent[],
  use: Use,
  basis: Basis,
  options: BankRangeOptions = {},
): number[] {
  const probability = (lnYears: number) => {
    let sum = 0;
    for (const part of components) sum += part.weight * shareBelow(part, use, basis, lnYears, options);
    return sum;
  };
  return (options.probabilities ?? [0.1, 0.9]).map((level) =>
    Math.exp(solveRising(probability, level, -8, 14)),
  );
}

/** Share of banks past 80 % at an age, at one component. */
function shareBelow(
  component: FitComponent,
  use: Use,
  basis: Basis,
  lnYears: number,
  options: BankRangeOptions,
): number {
  const { psi, exponent } = component;
  const effect = basis.kind === 'cellType' ? component.cellTypes[basis.index]! : undefined;
  const point = fadePoint({ psi, exponent, shift: effect?.m ?? 0 }, use, Math.exp(lnYears));
  const { startSd, paceVariance } = spreads(component, basis, options.isPlugIn ?? false);
  // With h the gradient of ln q and k that of ln q80 by c0, the variance is h'Vh - 2 k (Vh)_0 + k² V_00.
  const gradient = Array.from(point.slope, (slope, i) => slope + (effect?.slope[i] ?? 0));
  const moved = options.isPlugIn ? [] : multiply(component.covariance, gradient);
  const ofFade = moved.reduce((sum, value, i) => sum + value * gradient[i]!, 0);
  let total = 0;
  for (let k = 0; k < startWeights.length; k++) {
    const start = psi[at.c0]! + startSd * startRule.nodes[k]!;
    const level = Math.max(fadeAtShare(start, options.share), 1e-9);
    let variance = paceVariance;
    if (!options.isPlugIn) {
      const ofLevel = level > 1e-9 ? (1 - level) / level : 0;
      variance += ofFade - 2 * ofLevel * moved[at.c0]! + ofLevel * ofLevel * component.covariance[0]!;
    }
    total += startWeights[k]! * standardNormalCdf((point.lnFade - Math.log(level)) / Math.sqrt(variance));
  }
  return total;
}

/** sd of a bank's start, and variance of ln q between banks; E[sd²] of a lognormal sd when it is unknown. */
function spreads(
  component: FitComponent,
  basis: Basis,
  isPlugIn: boolean,
): { startSd: number; paceVariance: number } {
  const { psi, covariance } = component;
  const square = (place: number) =>
    Math.exp(2 * psi[place]! + (isPlugIn ? 0 : 2 * Math.min(1, covariance[place * psi.length + place]!)));
  const effect = basis.kind === 'cellType' ? component.cellTypes[basis.index]! : undefined;
  const between = effect ? (isPlugIn ? 0 : effect.variance) : square(at.lnSm);
  return { startSd: Math.sqrt(square(at.lnSc)), paceVariance: square(at.lnSu) + between };
}
