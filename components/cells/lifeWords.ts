import type { Life, Outside } from '@/lib/contract/cells';
import type { ToldEvidence } from '@/lib/contract/counts';
import { lifeFigure, lifeInShort, standingWords, toldOf } from '@/lib/contract/lifeWords';
import {
  formatCount,
  formatNumber,
  formatPercent,
  formatQuantity,
  formatRange,
  formatYears,
} from '@/lib/units';

export { lifeFigure, lifeInShort, standingWords, toldOf };

/** "38 banks, read to 7.2 y: 87 % left"; the pool's where the cell type has too few of its own. */
export function reachWords(evidence: ToldEvidence | null, life: Life): string {
  const { basis, reachYears, leftAtReachFraction } = life;
  const read = `read to ${formatQuantity(reachYears, 'y', { decimals: 1 })}: ${formatPercent(leftAtReachFraction.estimate)} left`;
  if (basis !== 'pool') return evidence ? `${formatCount(evidence.banks)} banks, ${read}` : read;
  const few = evidence ? `${formatCount(evidence.banks)} banks, fewer than 10` : 'too few owners yet';
  return `${few}: the pool’s figure`;
}

/** The whole row in words, for screen readers. */
export function lifeSummary(life: Life, impliedYears: number | undefined): string {
  const { value, range } = lifeFigure(life);
  const label =
    impliedYears === undefined ? '' : ` The label implies ${formatYears(impliedYears)} at this use.`;
  const told = toldOf(life);
  if (told === 'beyond') return `Beyond what the readings can say.${label}`;
  if (told === 'outside') return `The pool does not reach this use.${label}`;
  if (told === 'notMeasured') return `Not measured yet.${label}`;
  const banks = life.rangeOfBanks
    ? `, 8 of 10 banks ${formatRange(life.rangeOfBanks.lower, life.rangeOfBanks.upper, { decimals: 0 })} years`
    : '';
  const whose = life.basis === 'pool' ? ' The pool’s figure, over all cell types.' : '';
  return `${value} years to 80 %${range && `, 90 % range ${range} years`}${banks}, ${life.status}.${whose}${label}`;
}

const conditionWords: Record<Outside['condition'], (value: number) => string> = {
  depthFraction: (value) => `${formatPercent(value)} deep`,
  dischargeIt: (value) => formatQuantity(value, 'It', { decimals: 2 }),
  temperatureC: (value) => formatQuantity(value, '°C', { decimals: 0 }),
  socMeanFraction: (value) => `${formatPercent(value)} full on average`,
  efcPerYear: (value) => `${formatCount(Math.round(value))} full cycles a year`,
  isClamped: (value) => (value ? 'clamped' : 'not clamped'),
};

/** "The pool does not reach there: no banks at 40 °C; the nearest it supports is 35 °C." */
export function outsideSentence(outside: readonly Outside[]): string {
  const parts = outside.map(({ condition, value, nearest }) => {
    const words = conditionWords[condition];
    return `${words(Number(value))} (the nearest it supports is ${words(Number(nearest))})`;
  });
  return `The pool does not reach there: too few banks are used ${parts.join(', or ')}.`;
}

/** "95 % of this comes from the pool, 5 % from published studies." */
export function sourceSentence({ priorShareFraction, support, ownShareFraction }: Life): string | null {
  if (priorShareFraction === null) return null;
  const prior = Math.round(priorShareFraction * 100);
  const mark = support === 'leans' ? ' It leans on published studies.' : '';
  const own =
    ownShareFraction === null
      ? ''
      : ` Of how this cell type differs from others, ${formatPercent(ownShareFraction)} is its own readings’ word.`;
  return `${formatNumber(100 - prior)} % of this comes from the pool, ${formatNumber(prior)} % from published studies.${mark}${own}`;
}
