import { formatNumber, formatPercent, formatRange } from '@/lib/units';
import { extentOf, niceStep } from './chartScale';
import { endOfLifeFraction, type FadeStatus } from './fadeSeries';
import { fadeX, type FadeUnit } from './fadeWords';
import { historyReading, type HistoryCheck } from './historySeries';

/** Where 10, 25, 50, 75 and 90 % of banks lie below, at years or full cycles. */
export interface GrowthBand {
  x: number;
  quantiles: readonly number[];
  status: FadeStatus;
}

/** Names of the five lines, the lowest first. */
export const growthLines = ['10', '25', '50', '75', '90'] as const;

/** What the axes span: 80 % always, all that is drawn, and a little past the last point. */
export function growthDomain(checks: readonly HistoryCheck[], bands: readonly GrowthBand[]) {
  const end = extentOf([...checks.map(({ x }) => x), ...bands.map(({ x }) => x)])?.[1] ?? 1;
  const step = niceStep(Math.max(end, 0.5), 6);
  const heights = extentOf([
    endOfLifeFraction,
    1,
    ...checks.flatMap(({ soh, plusMinus }) => [soh - plusMinus, soh + plusMinus]),
    ...bands.flatMap(({ quantiles }) => quantiles),
  ])!;
  return {
    x: [0, Math.max(end, step)] as const,
    y: [
      Math.max(0, Math.floor((heights[0] - 0.01) * 20) / 20),
      Math.ceil((heights[1] + 0.005) * 50) / 50,
    ] as const,
  };
}

/** The bands cut where their standing changes; each part begins where the one before ends. */
export function growthParts(bands: readonly GrowthBand[]): { status: FadeStatus; points: GrowthBand[] }[] {
  const parts: { status: FadeStatus; points: GrowthBand[] }[] = [];
  for (const point of bands) {
    const last = parts.at(-1);
    if (last?.status === point.status) last.points.push(point);
    else parts.push({ status: point.status, points: [...(last?.points.slice(-1) ?? []), point] });
  }
  return parts.filter(({ points }) => points.length > 1);
}

/** "At 6.0 y: half of banks above 91 %, 8 of 10 between 86 and 94 %, projected". */
export function growthReading({ x, quantiles, status }: GrowthBand, unit: FadeUnit): string {
  const [low, , middle, , high] = quantiles;
  const most = formatRange(low! * 100, high! * 100, { decimals: 0 });
  return `At ${fadeX(x, unit)}: half of banks above ${formatPercent(middle!)}, 8 of 10 within ${most} %, ${status}`;
}

/** Everything that can be read along the chart, from left to right. */
export function growthReadings(
  checks: readonly HistoryCheck[],
  bands: readonly GrowthBand[],
  unit: FadeUnit,
): { x: number; text: string }[] {
  return [
    ...checks.map((check) => ({ x: check.x, text: historyReading(check) })),
    ...bands.map((band) => ({ x: band.x, text: growthReading(band, unit) })),
  ].sort((a, b) => a.x - b.x);
}

/** The chart in words. */
export function growthSummary(
  title: string,
  { checks, bands, unit }: { checks: readonly HistoryCheck[]; bands: readonly GrowthBand[]; unit: FadeUnit },
): string {
  const last = bands.findLast(({ status }) => status === 'measured') ?? bands[0];
  return [
    `${title}, against ${unit === 'years' ? 'years since first use' : 'full cycles since new'}.`,
    'Lines show below what capacity 10, 25, 50, 75 and 90 % of banks used like this one lie.',
    ...checks.map((check) => `${historyReading(check)}.`),
    last && `${growthReading(last, unit)}.`,
  ]
    .filter(Boolean)
    .join(' ');
}

/** Heights pushed apart, so that labels at them stand `gap` px clear; the order stays. */
export function spreadLabels(heights: readonly number[], gap: number): number[] {
  const order = heights.map((height, index) => ({ height, index })).sort((a, b) => a.height - b.height);
  const middle = Math.floor(order.length / 2);
  for (let i = middle + 1; i < order.length; i++)
    order[i]!.height = Math.max(order[i]!.height, order[i - 1]!.height + gap);
  for (let i = middle - 1; i >= 0; i--)
    order[i]!.height = Math.min(order[i]!.height, order[i + 1]!.height - gap);
  const spread = new Array<number>(heights.length);
  for (const { height, index } of order) spread[index] = height;
  return spread;
}

export const percentLabel = (fraction: number) => formatNumber(fraction * 100, { decimals: 0 });
