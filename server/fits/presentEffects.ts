import { type EffectVerdict, type Lever, type LeverEffect, leverSchema } from '@/lib/contract/effects';
import { minimumOwners } from '@/lib/contract/limits';
import type { ClampingClass, Effect, Verdict } from '@/lib/fit';

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
      evidence: rateClass ? { clamped: rateClass.clamped, unclamped: rateClass.unclamped } : null,
    };
  });
}

const rateClassOf = (lever: Lever) =>
  lever === 'clampingLowRate' ? 'below' : lever === 'clampingHighRate' ? 'above' : null;

const isEnough = ({ clamped, unclamped }: ClampingClass) =>
  clamped.owners >= minimumOwners && unclamped.owners >= minimumOwners;
