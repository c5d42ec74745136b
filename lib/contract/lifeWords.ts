import { formatNumber, formatRange } from '@/lib/units';

import type { Life } from './cells';

/** What a page may say of a life: the API gives every number with its status, pages decide. */
export type Told = 'figure' | 'range' | 'beyond' | 'outside' | 'notMeasured';

export function toldOf({ status, support, outside }: Pick<Life, 'status' | 'support' | 'outside'>): Told {
  if (support === 'notMeasured') return 'notMeasured';
  if (outside.length > 0) return 'outside';
  if (status === 'beyond') return 'beyond';
  return status === 'extrapolated' ? 'range' : 'figure';
}

/** "13" with its range "11–15", or the range alone where the figure is extrapolated; years. */
export function lifeFigure(life: Life): { value: string; range: string } {
  const { years } = life;
  const decimals = years.upper < 10 ? 1 : 0;
  const range = formatRange(years.lower, years.upper, { decimals });
  const told = toldOf(life);
  if (told === 'figure') return { value: formatNumber(years.estimate, { decimals }), range };
  return told === 'range' ? { value: range, range: '' } : { value: '–', range: '' };
}

/** Where the figure stands to the readings, in a word or two. */
export function standingWords(life: Life): string {
  const told = toldOf(life);
  if (told === 'outside') return 'outside the pool';
  if (told === 'notMeasured') return 'not measured yet';
  return told === 'beyond' ? 'beyond the readings' : life.status;
}

/** "13 y to 80 %, 90 % range 11–15 y, projected."; why there is no figure where none is told. */
export function lifeInShort(life: Life): string {
  const told = toldOf(life);
  if (told !== 'figure' && told !== 'range') return `No years to 80 %: ${standingWords(life)}.`;
  const { value, range } = lifeFigure(life);
  const whose = life.basis === 'pool' ? ', the pool’s figure' : '';
  return `${value} y to 80 %${range && `, 90 % range ${range} y`}, ${life.status}${whose}.`;
}
