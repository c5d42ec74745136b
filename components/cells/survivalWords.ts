import type { Survival } from '@/lib/contract/cells';
import { formatCount, formatPercent, formatRange } from '@/lib/units';

/** "At 6 years 92 % of banks were still above 80 % of their rating (90 % range 84–96 %)." and what is not known. */
export function survivalSentence({ points, hasFewCrossings }: Survival): string {
  const last = points.at(-1);
  if (!last) return 'No age is covered by at least five owners yet.';
  const { lowestFraction, highestFraction, lowerFraction, upperFraction } = last;
  const share =
    highestFraction - lowestFraction < 0.005
      ? formatPercent(highestFraction)
      : formatRange(lowestFraction * 100, highestFraction * 100, { decimals: 0, unit: '%' });
  const range = formatRange(lowerFraction * 100, upperFraction * 100, { decimals: 0, unit: '%' });
  const few = hasFewCrossings ? ' Banks of fewer than five owners have fallen below it so far.' : '';
  return `At ${formatCount(last.years)} years ${share} of banks were still above 80 % of their rating (90 % range ${range}).${few}`;
}
