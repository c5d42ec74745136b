import { type EffectVerdict, type Lever, type LeverEffect, leverSchema } from '@/lib/contract/effects';
import { minimumOwners } from '@/lib/contract/limits';
import { type ClampingClass, type Effect, type Verdict, verdictOf } from '@/lib/fit';

import { tellCount } from '../publicView/tellCounts';

const verdicts: Record<Verdict, EffectVerdict> = {
  shown: 'shown',
  'too small to matter': 'tooSmall',
  'could be none': 'couldBeNone',
  'not measured yet': 'notMeasured',
};

/** Conditions are compared at the fit's typical use; clamping in each of its rate classes. */
const scenarioOf: Record<Lever, string> = {
  heat: 'typical',
  depth: 'typical',
  chargeLevel: 'typical',
  rate: 'typical',
  clampingLowRate: 'typical',
  clampingHighRate: 'hard',
};

/**
 * Effects in the order of pages. Clamping stands by rate class with the banks and owners of each, and is left out of a
 * class where fewer than five owners clamp, or do not.
 */
export function presentEffects(effects: readonly Effect[], classes: readonly ClampingClass[]): LeverEffect[] {
  return leverSchema.options.flatMap((lever) => {
    const effect = effects.find((one) => one.lever === lever && one.scenario === scenarioOf[lever]);
    const rateClass = classes.find((one) => one.rateClass === rateClassOf(lever));
    if (!effect || (rateClass && !isEnough(rateClass))) return [];
    const { scenario, from, to, lifeRatio, lower, upper, priorShare, detectableRatio } = effect;
    return {
      ...{ lever, scenario, from, to, detectableRatio },
      ratio: { estimate: lifeRatio, lower, upper },
      priorShareFraction: priorShare,
      isAtLeast: effect.isAtLeast,
      isLeaning: effect.isLeaning,
      verdict: verdicts[effect.verdict],
      evidence: rateClass
        ? { clamped: tellSide(rateClass.clamped), unclamped: tellSide(rateClass.unclamped) }
        : null,
    };
  });
}

const tellSide = ({ banks, owners }: ClampingClass['clamped']) => ({
  banks: tellCount(banks),
  owners: tellCount(owners),
});

const rateClassOf = (lever: Lever) =>
  lever === 'clampingLowRate' ? 'below' : lever === 'clampingHighRate' ? 'above' : null;

const isEnough = ({ clamped, unclamped }: ClampingClass) =>
  clamped.owners >= minimumOwners && unclamped.owners >= minimumOwners;

type Contrast = Omit<Effect, 'lever' | 'scenario' | 'from' | 'to'>;

/** A contrast of two uses as an effect, such as of a bank's own use with another. */
export function presentContrast(
  ends: Pick<LeverEffect, 'lever' | 'from' | 'to'>,
  { lifeRatio, lower, upper, priorShare, detectableRatio, isAtLeast, isLeaning, verdict }: Contrast,
): LeverEffect {
  return {
    ...{ ...ends, scenario: 'own', detectableRatio, isAtLeast, isLeaning },
    ratio: { estimate: lifeRatio, lower, upper },
    priorShareFraction: priorShare,
    verdict: verdicts[verdict],
    evidence: null,
  };
}

type Joined = Pick<LeverEffect, 'ratio' | 'verdict' | 'isAtLeast' | 'isLeaning' | 'priorShareFraction'>;

/**
 * Effects of separate fits at once: their logarithms add, and their half ranges in quadrature. Null without any, or
 * where one of them is not measured.
 */
export function joinEffects(effects: readonly LeverEffect[]): Joined | null {
  if (effects.length === 0 || effects.some(({ verdict }) => verdict === 'notMeasured')) return null;
  const ln = (pick: (effect: LeverEffect) => number) => effects.map((effect) => Math.log(pick(effect)));
  const middle = ln(({ ratio }) => ratio.estimate);
  const sum = middle.reduce((total, value) => total + value, 0);
  const away = (ends: number[]) => Math.hypot(...ends.map((end, i) => end - middle[i]!));
  const ratio = {
    estimate: Math.exp(sum),
    lower: Math.exp(sum - away(ln(({ ratio: { lower } }) => lower))),
    upper: Math.exp(sum + away(ln(({ ratio: { upper } }) => upper))),
  };
  const priorShareFraction = Math.max(...effects.map((effect) => effect.priorShareFraction));
  return {
    ...{ ratio, priorShareFraction },
    verdict: verdicts[verdictOf(ratio.lower, ratio.upper, priorShareFraction)],
    isAtLeast: effects.some(({ isAtLeast }) => isAtLeast),
    isLeaning: effects.some(({ isLeaning }) => isLeaning),
  };
}
