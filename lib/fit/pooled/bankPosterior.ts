import type { PoolCheck } from '../poolCheck';
import { multiply, type Basis } from './derived';
import { fadePoint, lnKept } from './fade';
import { hermiteRule } from './hermite';
import { basisOf } from './life';
import { at, referenceRelSd } from './parameters';
import type { PublishedFit } from './types';
import type { Use } from './use';

const shiftRule = hermiteRule(5);
const shiftWeights = shiftRule.nodes.map((x, k) =>
  Math.exp(shiftRule.logWeights[k]! - 0.5 * x * x - 0.5 * Math.log(2 * Math.PI)),
);
const gridPoints = 81;
const gridHalfWidth = 4.5;
const leastWeight = 1e-6;

/** A possible start and pace of the bank, with how likely it is. */
export interface PosteriorAtom {
  weight: number;
  /** u + a: how far the bank's ln q lies off the fit's curve. */
  offset: number;
  /** a: the part of it that is an error of the fit's curve, not the bank's own. */
  shift: number;
  /** Mean of the bank's start c at this offset. */
  start: number;
}

/** All that lies at one offset: what a forecast needs, which does not ask whose the offset is. */
export interface PosteriorOffset {
  weight: number;
  offset: number;
  start: number;
  /** Mean and variance of the shift among it. */
  shift: number;
  shiftVariance: number;
}

/** The bank at one calendar exponent. */
export interface PosteriorPart {
  component: PublishedFit['components'][number];
  /** Effect of the cell type on ln q, 0 where the pool stands in. */
  effect: { m: number; slope: readonly number[] | null };
  atoms: PosteriorAtom[];
  offsets: PosteriorOffset[];
  /** Spacing of the offsets. */
  step: number;
  /** sd of ln q between banks of the population compared with. */
  paceSd: number;
  /** Variance of a start, given the offset. */
  startVariance: number;
  /** Gradient of ln q at the last check, and the variance of a. */
  reference: { gradient: number[]; moved: number[]; variance: number };
}

/** What a bank's own checks say of its start and pace. */
export interface BankPosterior {
  parts: PosteriorPart[];
  /** Banks of its cell type, or of any where it has too few. */
  basis: 'cellType' | 'pool';
  checks: number;
}

/** The use a check was made under, from its conditions to date. */
export function checkUse(check: PoolCheck): Use {
  const { depthFraction, dischargeIt, temperatureC, socMeanFraction, isClamped } = check;
  return {
    ...{ depthFraction, dischargeIt, temperatureC, socMeanFraction, isClamped },
    efcPerYear: check.efc / check.ageYears,
  };
}

/**
 * Posterior of a bank's start c and pace u from its own checks (README equation 28). The pool's posterior of psi and m
 * is taken as it stands, also where the bank is part of it: one bank moves only its own c and u. What is unknown of the
 * pool's curve enters as one shift a of ln q, a ~ N(0, g'Vg) with g the gradient at the last check:
 * p(u, a | checks) = N(a) N(u; 0, su²) L(u + a) / Z(a), L with c integrated in closed form, on a grid of u + a.
 * @param checks of one bank, at reference conditions
 * @param cellType a cell type the fit may not know; one with fewer than 10 banks or 5 owners, or unknown, is compared
 *   with banks of any cell type
 * @throws RangeError without a check
 */
export function bankPosterior(
  fit: PublishedFit,
  checks: readonly PoolCheck[],
  cellType: string,
): BankPosterior {
  const last = [...checks].sort((a, b) => a.ageYears - b.ageYears).at(-1);
  if (!last) throw new RangeError('bankPosterior requires a check of the bank');
  const isKnown = fit.cellTypes.some((row) => row.cellType === cellType);
  const basis: Basis = isKnown ? basisOf(fit, cellType) : { kind: 'pool' };
  return {
    parts: fit.components.map((component) => partOf(component, basis, checks, last)),
    basis: basis.kind === 'cellType' ? 'cellType' : 'pool',
    checks: checks.length,
  };
}

function partOf(
  component: PublishedFit['components'][number],
  basis: Basis,
  checks: readonly PoolCheck[],
  last: PoolCheck,
): PosteriorPart {
  const { psi, covariance, exponent } = component;
  // An sd that is not known enters as E[sd²], as elsewhere.
  const square = (place: number) =>
    Math.exp(2 * psi[place]! + 2 * Math.min(1, covariance[place * psi.length + place]!));
  const own = basis.kind === 'cellType' ? component.cellTypes[basis.index]! : undefined;
  const effect = { m: own?.m ?? 0, slope: own?.slope ?? null };
  const paceVariance = square(at.lnSu) + (own ? 0 : square(at.lnSm));
  const inputs = { psi, exponent, shift: effect.m };
  const gradient = gradientOf(fadePoint(inputs, checkUse(last), last.ageYears).slope, effect.slope);
  const moved = multiply(covariance, gradient);
  const variance = dot(gradient, moved) + (own?.variance ?? 0);
  const startPrior = square(at.lnSc) + covariance[0]!;
  const noise = square(at.lnS);
  const rho = startPrior / noise;
  const sumOfWeights = checks.reduce((sum, check) => sum + (referenceRelSd / check.relSd) ** 2, 0);
  const kappa = rho / (1 + rho * sumOfWeights);
  const seen = checks.map((check) => ({
    y: Math.log(check.capacityAh / check.ratedAh) - psi[at.c0]!,
    lnFade: fadePoint(inputs, checkUse(check), check.ageYears).lnFade,
    weight: (referenceRelSd / check.relSd) ** 2,
  }));
  const reach = gridHalfWidth * Math.sqrt(paceVariance + variance);
  const step = (2 * reach) / (gridPoints - 1);
  const grid = Array.from({ length: gridPoints }, (_, i) => {
    const offset = -reach + i * step;
    let first = 0;
    let second = 0;
    for (const { y, lnFade, weight } of seen) {
      const residual = y - lnKept(Math.exp(lnFade + offset));
      first += weight * residual;
      second += weight * residual * residual;
    }
    return { offset, start: kappa * first, lnLikelihood: (-0.5 * (second - kappa * first * first)) / noise };
  });
  const atoms = atomsOf(grid, { paceVariance, shiftVariance: variance, weight: component.weight });
  return {
    ...{ component, effect, step, atoms },
    offsets: offsetsOf(atoms),
    paceSd: Math.sqrt(paceVariance),
    startVariance: noise * kappa,
    reference: { gradient, moved, variance },
  };
}

interface GridPoint {
  offset: number;
  start: number;
  lnLikelihood: number;
}

function atomsOf(
  grid: readonly GridPoint[],
  { paceVariance, shiftVariance, weight }: { paceVariance: number; shiftVariance: number; weight: number },
): PosteriorAtom[] {
  return Array.from(shiftRule.nodes).flatMap((node, k) => {
    const shift = Math.sqrt(shiftVariance) * node;
    const logs = grid.map(
      ({ offset, lnLikelihood }) => lnLikelihood - (offset - shift) ** 2 / (2 * paceVariance),
    );
    const top = Math.max(...logs);
    const total = logs.reduce((sum, log) => sum + Math.exp(log - top), 0);
    return grid
      .map(({ offset, start }, i) => ({
        ...{ offset, shift, start },
        weight: (weight * shiftWeights[k]! * Math.exp(logs[i]! - top)) / total,
      }))
      .filter((atom) => atom.weight > leastWeight);
  });
}

function offsetsOf(atoms: readonly PosteriorAtom[]): PosteriorOffset[] {
  const sums = new Map<number, { weight: number; start: number; first: number; second: number }>();
  for (const { weight, offset, shift, start } of atoms) {
    const sum = sums.get(offset) ?? { start, weight: 0, first: 0, second: 0 };
    sum.weight += weight;
    sum.first += weight * shift;
    sum.second += weight * shift * shift;
    sums.set(offset, sum);
  }
  return [...sums].map(([offset, { weight, start, first, second }]) => {
    const shift = first / weight;
    return { weight, offset, start, shift, shiftVariance: Math.max(second / weight - shift * shift, 0) };
  });
}

/** Gradient of ln q over psi, the cell type's effect moving along. */
export function gradientOf(slope: ArrayLike<number>, ofEffect: readonly number[] | null): number[] {
  return Array.from(slope, (value, i) => value + (ofEffect?.[i] ?? 0));
}

export const dot = (a: readonly number[], b: readonly number[]): number =>
  a.reduce((sum, value, i) => sum + value * b[i]!, 0);
