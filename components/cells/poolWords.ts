import type { Absence, Evidence, Life, PoolSummary, Use } from '@/lib/contract/cells';
import {
  formatCount,
  formatNumber,
  formatPercent,
  formatQuantity,
  formatRange,
  formatYears,
} from '@/lib/units';

/** "4,216 checks on 1,204 banks, screened and pooled. Readings reach 7.4 years." */
export function poolSentence({ evidence, reachYears }: PoolSummary): string {
  if (!evidence) return 'No checks are published yet.';
  const counts = `${formatCount(evidence.checks)} checks on ${formatCount(evidence.banks)} banks, screened and pooled.`;
  return reachYears === null ? counts : `${counts} Readings reach ${formatYears(reachYears)}.`;
}

const waitingSentences: Record<PoolSummary['waiting'], string | null> = {
  none: null,
  fewerThanFiveOwners:
    'Approved checks of fewer than 5 owners wait to be published. They join when at least 5 owners wait, so that no figure gives one owner away.',
  due: 'Approved checks of at least 5 owners are being added now.',
};

/** What waits outside the public pool, or null when nothing does. */
export const waitingSentence = ({ waiting }: PoolSummary): string | null => waitingSentences[waiting];

/** "Cycled 60 % deep at 0.1 It, once a day, near 25 °C, half full on average, not clamped." */
export function sentenceOfUse(use: Use): string {
  const depth = `${formatPercent(use.depthFraction)} deep`;
  const rate = formatQuantity(use.dischargeIt, 'It', { decimals: use.dischargeIt < 0.1 ? 2 : 1 });
  const often =
    use.cyclesPerDay === 1 ? 'once a day' : `${formatNumber(use.cyclesPerDay, { decimals: 1 })} times a day`;
  const heat = formatQuantity(use.temperatureC, '°C', { decimals: 0 });
  const full = use.socMeanFraction === 0.5 ? 'half full' : `${formatPercent(use.socMeanFraction)} full`;
  const held = use.isClamped ? 'clamped' : 'not clamped';
  return `Cycled ${depth} at ${rate}, ${often}, near ${heat}, ${full} on average, ${held}.`;
}

/** Why there is no figure, and what would help. */
export const absenceWords: Record<Absence, { short: string; long: string }> = {
  tooFewOwners: {
    short: 'too few owners yet',
    long: 'Fewer than 5 owners stand behind this, so no figure is shown. Checks of more owners would bring one.',
  },
  tooFewChecks: {
    short: 'too few checks yet',
    long: 'There are not enough checks at different ages to draw a curve. More yearly checks would bring one.',
  },
  notConverged: {
    short: 'no steady figure',
    long: 'The readings do not settle on one curve, so none is shown.',
  },
  noFit: { short: 'not fitted yet', long: 'The pool has not been fitted yet.' },
};

/** "13 y", or the range alone where the figure is extrapolated. */
export function lifeFigure({ status, years }: Life): { value: string; range: string } {
  if (!years) return { value: '–', range: '' };
  const decimals = years.upper < 10 ? 1 : 0;
  const range = formatRange(years.lower, years.upper, { decimals });
  return status === 'extrapolated'
    ? { value: range, range: '' }
    : { value: formatNumber(years.estimate, { decimals }), range };
}

/** "38 banks, read to 7.2 y: 87 % left" */
export function reachWords({ banks }: Evidence, { reachYears, leftAtReachFraction }: Life): string {
  const left = formatPercent(leftAtReachFraction.estimate);
  return `${formatCount(banks)} banks, read to ${formatQuantity(reachYears, 'y', { decimals: 1 })}: ${left} left`;
}

/** The whole row in words, for screen readers. */
export function lifeSummary(life: Life, quotedYears: number | undefined): string {
  const { value, range } = lifeFigure(life);
  const quoted =
    quotedYears === undefined ? '' : ` The label comes to ${formatYears(quotedYears)} at this use.`;
  if (!life.years) return `Beyond what the readings can say.${quoted}`;
  return `${value} years to 80 %${range && `, 90 % range ${range} years`}, ${life.status}.${quoted}`;
}
