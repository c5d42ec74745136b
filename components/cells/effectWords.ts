import type { Lever, LeverEffect } from '@/lib/contract/effects';
import { formatCount, formatNumber, formatPercent, formatRange } from '@/lib/units';

/** Name of a lever, and its ends in words. */
const levers: Record<Lever, { name: string; end: (value: number) => string; unit: string }> = {
  heat: { name: 'Heat', end: (value) => formatNumber(value), unit: '°C' },
  depth: { name: 'Depth', end: (value) => formatNumber(value * 100), unit: '%' },
  chargeLevel: { name: 'Charge level', end: (value) => formatNumber(value * 100), unit: '%' },
  rate: { name: 'Rate', end: (value) => formatNumber(value), unit: 'It' },
  clampingLowRate: { name: 'Clamping', end: () => '', unit: 'below 0.3 It' },
  clampingHighRate: { name: 'Clamping', end: () => '', unit: 'above 0.3 It' },
};

export const leverName = ({ lever }: LeverEffect): string => levers[lever].name;

/** "30 → 20 °C", "below 0.3 It" */
export function changeWords({ lever, from, to }: LeverEffect): string {
  const { end, unit } = levers[lever];
  if (typeof from === 'boolean' || typeof to === 'boolean') return unit;
  const what = lever === 'chargeLevel' ? 'mean ' : '';
  return `${what}${end(from)} → ${end(to)} ${unit}`;
}

const ratioRange = ({ ratio }: Pick<LeverEffect, 'ratio'>, word: string) =>
  formatRange(ratio.lower, ratio.upper, { decimals: 2 }).replace('–', ` ${word} `);

/** The four verdicts in their one wording. */
export function verdictWords(effect: Pick<LeverEffect, 'ratio' | 'verdict'>): string {
  switch (effect.verdict) {
    case 'shown':
      return 'shown';
    case 'tooSmall':
      return 'too small to matter';
    case 'couldBeNone':
      return `could be none, or ${ratioRange(effect, 'to')}`;
    case 'notMeasured':
      return 'not measured yet';
  }
}

/** "×1.39"; none while it is not measured. */
export const ratioWords = ({ ratio, verdict }: Pick<LeverEffect, 'ratio' | 'verdict'>): string | undefined =>
  verdict === 'notMeasured' ? undefined : `×${formatNumber(ratio.estimate, { decimals: 2 })}`;

/** Below the bar: range, what leans on what, who stands behind it, or what it would take to see more. */
export function effectNote(effect: LeverEffect): string {
  const { verdict, isAtLeast, isLeaning, priorShareFraction, evidence, detectableRatio } = effect;
  const published = formatPercent(priorShareFraction);
  const sides =
    evidence &&
    `${formatCount(evidence.clamped.banks)} banks clamped, ${formatCount(evidence.unclamped.banks)} not, of ${formatCount(evidence.clamped.owners)} and ${formatCount(evidence.unclamped.owners)} owners`;
  if (verdict === 'notMeasured')
    return [`${published} of what could be said would come from published studies`, sides]
      .filter(Boolean)
      .join('; ');
  const seen = `a pool like this shows effects from ×${formatNumber(detectableRatio, { decimals: 2 })}`;
  return [
    `${isAtLeast ? 'at least, as owners guess it; ' : ''}90 % range ${ratioRange(effect, 'to')}`,
    isLeaning && `leans on published studies (${published})`,
    verdict === 'couldBeNone' && seen,
    sides,
  ]
    .filter(Boolean)
    .join('; ');
}
