import { verdictWords } from '@/components/cells/effectWords';
import type { LeverEffect } from '@/lib/contract/effects';
import { formatNumber } from '@/lib/units';

const times = (ratio: number) => `×${formatNumber(ratio, { decimals: 2 })}`;

/** "×1.31 (×1.22 to ×1.41)" */
export const ratioRangeWords = ({ ratio }: LeverEffect): string =>
  `${times(ratio.estimate)} (${times(ratio.lower)} to ${times(ratio.upper)})`;

/**
 * The conclusion that follows from an effect's verdict.
 * @param change what is changed: "Going from 30 °C to 20 °C"
 * @param better what the change is called when it lengthens a life: "A cooler place"
 */
export function conclusion(effect: LeverEffect, change: string, better: string): string {
  const { verdict, ratio, isAtLeast, detectableRatio } = effect;
  const atLeast = isAtLeast ? 'at least ' : '';
  switch (verdict) {
    case 'shown':
      return ratio.estimate > 1
        ? `${better} lasts longer. ${change} multiplies a bank’s life by ${atLeast}${ratioRangeWords(effect)}.`
        : `The pool says the reverse of what is usually thought. ${change} multiplies a bank’s life by ${ratioRangeWords(effect)}.`;
    case 'tooSmall':
      return `It makes no difference that matters. ${change} changes a bank’s life by less than 5 % either way.`;
    case 'couldBeNone':
      return `It ${verdictWords(effect)} times the life: the pool can’t tell yet. A pool like this shows effects from ${times(detectableRatio)}.`;
    case 'notMeasured':
      return 'It is not measured yet: most of what could be said would come from published studies.';
  }
}

/** What clamping does in one class of rate, held against a ratio that would pay for it. */
export function clampingSentence(effect: LeverEffect, breakEvenRatio: number | null): string {
  const rate = effect.lever === 'clampingLowRate' ? 'below 0.3 It' : 'above 0.3 It';
  const { ratio, verdict } = effect;
  if (verdict === 'notMeasured') return `What clamping does ${rate} is not measured yet.`;
  const said = `The pool says of clamping ${rate}: ${verdictWords(effect)}, a life of ${ratioRangeWords(effect)}.`;
  if (breakEvenRatio === null) return said;
  if (ratio.lower > breakEvenRatio) return `${said} That pays for it.`;
  if (ratio.upper < breakEvenRatio) return `${said} That does not pay for it.`;
  return `${said} Whether that pays can not be told yet.`;
}

/** What is true of every answer here. */
export const commonCaveats: readonly string[] = [
  'Volunteers’ banks are not an experiment: nobody dealt them their use by lot. The model compares like with like as far as the conditions asked for go.',
  'Banks that stopped reporting may have done worse than those that went on.',
  'No sudden drop late in life is modelled.',
];
