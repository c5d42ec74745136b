import { type BankPosterior, dot, gradientOf, type PosteriorPart } from './bankPosterior';
import { multiply } from './derived';
import { fadeAtShare, fadePoint } from './fade';
import { solveRising, standardNormalCdf } from './normal';
import { at } from './parameters';
import type { Ranged } from './types';
import type { Use } from './use';

const tail = 0.05;
// Three minutes and 3,000 years, ln of years.
const lnYearsFrom = -12;
const lnYearsTo = 8;

/** Where a bank stands among banks used like it. */
export interface BankStanding {
  /** Share of them that fade faster, 1 - Phi(u / su): 0 the fastest fading, 1 the slowest; with its 90 % range. */
  fasterFraction: Ranged;
  /** e^u: its fade over that of the typical one, with its 90 % range. */
  paceRatio: Ranged;
}

/** Standing of a bank by the pace its own checks give it (README equation 29). */
export function standingOf(posterior: BankPosterior): BankStanding {
  const quantile = (probability: number, scale: (part: PosteriorPart) => number) =>
    solveRising((x) => shareBelow(posterior, x, scale), probability, -8, 8);
  const bySd = ({ paceSd }: PosteriorPart) => paceSd;
  const faster = (probability: number) => 1 - standardNormalCdf(quantile(probability, bySd));
  const pace = (probability: number) => Math.exp(quantile(probability, () => 1));
  return {
    fasterFraction: { estimate: faster(0.5), lower: faster(1 - tail), upper: faster(tail) },
    paceRatio: { estimate: pace(0.5), lower: pace(tail), upper: pace(1 - tail) },
  };
}

/** Posterior probability that u / scale lies below x; each atom is spread evenly over its place on the grid. */
function shareBelow({ parts }: BankPosterior, x: number, scale: (part: PosteriorPart) => number): number {
  let sum = 0;
  let all = 0;
  for (const part of parts) {
    const edge = x * scale(part);
    for (const { weight, offset, shift } of part.atoms) {
      all += weight;
      sum += weight * Math.min(1, Math.max(0, (edge - (offset - shift)) / part.step + 0.5));
    }
  }
  return sum / all;
}

/** When a bank comes down to a share of its rating. */
export interface BankForecast {
  /** Years since new, with the 90 % range. */
  years: Ranged;
  /** Probability that it has come down to it by an age, 0..1. */
  probabilityBy: (years: number) => number;
}

/**
 * Years until a bank is down to a share of its rating, given its own checks, if it goes on as it was used to date
 * (README equation 30): the probability of having passed it by t is the mean of Phi([ln q(t) + u + a + b - ln q80(c0 +
 * c)] / sd) over the posterior, where b is what the pool's curve may be off at t beyond a.
 * @param share end of life as a share of the rating
 */
export function forecastOf(posterior: BankPosterior, use: Use, share = 0.8): BankForecast {
  const probabilityBy = (years: number) => {
    let sum = 0;
    let all = 0;
    for (const part of posterior.parts) {
      const passed = passedBy(part, use, { years, share });
      for (const atom of part.offsets) {
        all += atom.weight;
        sum += atom.weight * passed(atom);
      }
    }
    return sum / all;
  };
  const yearsAt = (probability: number) =>
    Math.exp(solveRising((lnYears) => probabilityBy(Math.exp(lnYears)), probability, lnYearsFrom, lnYearsTo));
  return {
    years: { estimate: yearsAt(0.5), lower: yearsAt(tail), upper: yearsAt(1 - tail) },
    probabilityBy,
  };
}

function passedBy(
  { component, effect, reference, startVariance }: PosteriorPart,
  use: Use,
  { years, share }: { years: number; share: number },
): (atom: PosteriorPart['offsets'][number]) => number {
  const { psi, exponent, covariance } = component;
  const point = fadePoint({ psi, exponent, shift: effect.m }, use, years);
  const gradient = gradientOf(point.slope, effect.slope);
  // What the error of the curve differs by from that at the last check, regressed on the latter.
  const away = gradient.map((value, i) => value - reference.gradient[i]!);
  const together = dot(away, reference.moved);
  const withShift = reference.variance > 0 ? together / reference.variance : 0;
  const rest = Math.max(dot(away, multiply(covariance, away)) - withShift * together, 0);
  return ({ offset, shift, shiftVariance, start }) => {
    const level = Math.max(fadeAtShare(psi[at.c0]! + start, share), 1e-9);
    const ofStart = level > 1e-9 ? (1 - level) / level : 0;
    const ofShift = withShift * withShift * shiftVariance;
    const sd = Math.sqrt(rest + ofShift + ofStart * ofStart * startVariance + 1e-10);
    return standardNormalCdf((point.lnFade + offset + withShift * shift - Math.log(level)) / sd);
  };
}
