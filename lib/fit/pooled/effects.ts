import { derive } from './derived';
import { lnLife } from './fade';
import { z90 } from './normal';
import { leansShare, notMeasuredShare } from './support';
import type { PublishedFit } from './types';
import type { Scenario, Use } from './use';

/** The four verdicts on an effect. */
export type Verdict = 'shown' | 'too small to matter' | 'could be none' | 'not measured yet';

export type EffectLever =
  'clamping' | 'clampingLowRate' | 'clampingHighRate' | 'depth' | 'rate' | 'heat' | 'chargeLevel';

/** What a lever does to life in a scenario: years at `to` over years at `from`, all else equal. */
export interface Effect {
  lever: EffectLever;
  scenario: string;
  from: number | boolean;
  to: number | boolean;
  lifeRatio: number;
  lower: number;
  upper: number;
  /** se of the ln life ratio, before any widening. */
  seLn: number;
  /** The smallest ratio above 1 that this pool would show 4 times in 5: e^(2.49 se). */
  detectableRatio: number;
  priorShare: number;
  /** The range leans on published studies (prior share 25-50 %). */
  isLeaning: boolean;
  /** Guessed inputs shrink the effect: the range is widened outwards and read "at least". */
  isAtLeast: boolean;
  verdict: Verdict;
}

/** How much of a condition's spread in the pool is real: 1 when all is metered. */
export interface InputReliability {
  temperature: number;
  soc: number;
}

const tooSmall = { lower: 0.95, upper: 1.05 };
// 90 % range excludes 1 with probability 0.8: quantiles of 0.95 and 0.8 added.
const detectableSe = z90 + 0.8416212335729143;

/** Preset comparisons: what a lever is moved from and to. Depth is moved at the same full cycles per year. */
export const leverMoves = {
  depth: { from: 0.8, to: 0.5 },
  rate: { from: 0.4, to: 0.2 },
  heat: { from: 30, to: 20 },
  chargeLevel: { from: 0.7, to: 0.5 },
} as const;

/** Which verdict a 90 % range and a prior share give. */
export function verdictOf(lower: number, upper: number, priorShare: number): Verdict {
  if (priorShare > notMeasuredShare) return 'not measured yet';
  if (lower > tooSmall.lower && upper < tooSmall.upper) return 'too small to matter';
  return lower > 1 || upper < 1 ? 'shown' : 'could be none';
}

/** A verdict in words, with the range where one is due. */
export function verdictInWords(effect: Effect): string {
  const from = effect.lower.toFixed(2);
  const to = effect.upper.toFixed(2);
  switch (effect.verdict) {
    case 'shown':
      return `shown: life x ${from} to ${to}`;
    case 'too small to matter':
      return 'too small to matter';
    case 'could be none':
      return `could be none, or x ${from} to ${to}`;
    case 'not measured yet':
      return 'not measured yet';
  }
}

/**
 * Life ratio of two uses, by the delta method on its logarithm (README equation 22).
 * @param added value of an added term at each end, for refits with one
 * @param stretch further part of the ln ratio that guessed inputs may hide (0 when metered)
 */
export function contrastUses(
  fit: Pick<PublishedFit, 'components' | 'priors'>,
  uses: { from: Use; to: Use; addedFrom?: number; addedTo?: number },
  stretch = 0,
): Omit<Effect, 'lever' | 'scenario' | 'from' | 'to'> {
  const { mean, se, priorShare } = derive(fit, { kind: 'average' }, ({ psi, exponent }) => {
    const from = lnLife({ psi, exponent }, uses.from, undefined, uses.addedFrom);
    const to = lnLife({ psi, exponent }, uses.to, undefined, uses.addedTo);
    const gradient = to.gradient.map((value, i) => value - from.gradient[i]!);
    return { value: to.lnYears - from.lnYears, gradient };
  });
  const outward = Math.abs(mean) * stretch;
  const lower = Math.exp(mean - z90 * se - (mean < 0 ? outward : 0));
  const upper = Math.exp(mean + z90 * se + (mean > 0 ? outward : 0));
  return {
    lifeRatio: Math.exp(mean),
    ...{ lower, upper, seLn: se, priorShare },
    detectableRatio: Math.exp(detectableSe * se),
    isLeaning: priorShare > leansShare && priorShare <= notMeasuredShare,
    isAtLeast: stretch > 0,
    verdict: verdictOf(lower, upper, priorShare),
  };
}

/** Effects of every lever in a scenario, from the main fit; clamping there is one figure over all rates. */
export function effectsOf(
  fit: Pick<PublishedFit, 'components' | 'priors'>,
  scenario: Scenario,
  reliability: InputReliability,
): Effect[] {
  const between = <K extends keyof Use>(
    lever: EffectLever,
    key: K,
    from: Use[K],
    to: Use[K],
    stretch = 0,
  ) => ({
    ...{ lever, scenario: scenario.name, from, to },
    ...contrastUses(fit, { from: { ...scenario, [key]: from }, to: { ...scenario, [key]: to } }, stretch),
  });
  const { depth, rate, heat, chargeLevel } = leverMoves;
  return [
    between('clamping', 'isClamped', false, true),
    between('depth', 'depthFraction', depth.from, depth.to),
    between('rate', 'dischargeIt', rate.from, rate.to),
    between('heat', 'temperatureC', heat.from, heat.to, stretchOf(reliability.temperature)),
    between('chargeLevel', 'socMeanFraction', chargeLevel.from, chargeLevel.to, stretchOf(reliability.soc)),
  ];
}

/** A slope on an input of reliability r comes out r times too small: the rest is (1 - r) / r of what is seen. */
export function stretchOf(reliability: number): number {
  return (1 - reliability) / reliability;
}
