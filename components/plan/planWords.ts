import type { PlanResult } from '@/lib/plan';
import { formatMoney, formatNumber, formatPercent, formatQuantity, formatRange } from '@/lib/units';
import type { Ranged } from '@/lib/fit/pooled/published';

/** "13 (11–15)": an estimate with its range. */
export function rangedWords({ estimate, lower, upper }: Ranged, decimals: number): string {
  const range = formatRange(lower, upper, { decimals });
  const alone = formatNumber(estimate, { decimals });
  return range === `${alone}–${alone}` ? alone : `${alone} (${range})`;
}

/** Money with its range: "€2,140 (1,890–2,410)". */
export function moneyRange({ estimate, lower, upper }: Ranged, currency: string): string {
  return `${wholeMoney(estimate, currency)} (${wholeMoney(lower, currency)} to ${wholeMoney(upper, currency)})`;
}

/** Money without its minor units: what a plan can know. */
export function wholeMoney(minor: number, currency: string): string {
  const rounded = Math.round(minor / 100) * 100;
  return formatMoney(rounded, currency).replace(/\.00$/, '');
}

/** A price per kWh to a hundredth of the major unit's tenth: "€0.162". */
export function pricePerKwh(minor: number, currency: string): string {
  const symbol = formatMoney(0, currency).replace(/[\d.,\s]+/, '');
  return `${symbol}${formatNumber(minor / 100, { decimals: 3 })}`;
}

/** "€0.162 (0.151–0.177) per kWh" */
export function costRange(cost: Ranged, currency: string): string {
  const range = formatRange(cost.lower / 100, cost.upper / 100, { decimals: 3 });
  return `${pricePerKwh(cost.estimate, currency)} (${range})`;
}

/** How long it lasts, in a sentence that stays true past the readings. */
export function lifeSentence({ years, isCapped, life, endedBy }: PlanResult): string {
  if (isCapped)
    return `It passes ${formatNumber(years.estimate, { decimals: 0 })} years, three times what is measured; the plan counts no further, so energy and gain are at least these, the cost at most.`;
  const what =
    endedBy === 'calendar' ? 'Time takes more of it than cycles do' : 'Cycles take more of it than time does';
  return `To 80 % of the rating, ${life.status}. ${what}.`;
}

/** What the first and the last night ask of the bank. */
export function depthWords({ first, points }: PlanResult): string {
  const last = points.at(-1)?.wantedDepthFraction ?? first.depthFraction;
  return `${formatPercent(first.depthFraction)} at first, ${formatPercent(last)} at the end`;
}

/** When the night's energy stops fitting. */
export function shortWords({ shortYears }: PlanResult): string {
  if (shortYears === null) return 'fits to the end';
  if (shortYears === 0) return 'does not fit from the first night';
  return `no longer fits after ${formatQuantity(shortYears, 'years', { decimals: 1 })}`;
}

export function breakEvenWords({ breakEvenYears }: PlanResult): string {
  return breakEvenYears === null
    ? 'not within its life'
    : formatQuantity(breakEvenYears, 'years', { decimals: 1 });
}

/** Years alone: past the longest that is counted it is only said to be longer. */
export function aloneWords(years: number): string {
  return years > 60 ? 'over 60 years' : formatQuantity(years, 'years', { decimals: 0 });
}
