import { formatCount, formatNumber, formatRange } from '@/lib/units';
import { extentOf, niceStep } from './chartScale';

/** Exact, or the range it lies in. */
type BinCount = number | { from: number; to: number };

/** What stands in one bin along x: the median and middle 80 % of some checks. */
export interface BinPoint {
  /** Ends of the bin; null where it is open. */
  from: number | null;
  to: number | null;
  median: number;
  lower: number;
  upper: number;
  /** What the model says there, where it says anything. */
  model: number | null;
  owners: BinCount;
  checks: BinCount;
}

/** Bins of one group, with the shape that marks it. */
export interface BinSeries {
  label: string;
  mark: 'circle' | 'square';
  points: readonly BinPoint[];
}

export interface PlacedBin extends BinPoint {
  x: number;
}

/** Open bins are drawn as wide as their neighbour; a lone open one about its end. */
export function placeBins(points: readonly BinPoint[]): PlacedBin[] {
  const widths = points.flatMap(({ from, to }) => (from !== null && to !== null ? [to - from] : []));
  const width = widths.length > 0 ? widths.reduce((sum, one) => sum + one, 0) / widths.length : 1;
  return points.map((point) => {
    const { from, to } = point;
    if (from !== null && to !== null) return { ...point, x: (from + to) / 2 };
    if (from !== null) return { ...point, x: from + width / 2 };
    return { ...point, x: to === null ? 0 : to - Math.min(width, to) / 2 };
  });
}

export interface BinDomain {
  x: readonly [number, number];
  y: readonly [number, number];
}

/** Both axes from round value to round value past all that is drawn; `holds` is a level that must be on the chart. */
export function binDomain(series: readonly BinSeries[], holds?: number): BinDomain {
  const placed = series.flatMap(({ points }) => placeBins(points));
  const x = extentOf(placed.flatMap((bin) => [bin.from ?? bin.x, bin.to ?? bin.x, bin.x])) ?? [0, 1];
  const y = extentOf([
    ...placed.flatMap(({ lower, upper, model }) => [lower, upper, ...(model === null ? [] : [model])]),
    ...(holds === undefined ? [] : [holds]),
  ]) ?? [0, 1];
  return { x: roundOut(x, 6), y: roundOut(y, 5) };
}

function roundOut([from, to]: readonly [number, number], count: number): readonly [number, number] {
  const span = to > from ? to - from : Math.abs(to) || 1;
  const step = niceStep(span, count);
  return [
    Math.floor(from / step + 1e-9) * step,
    Math.ceil((to > from ? to : to + span) / step - 1e-9) * step,
  ];
}

/** "1 to 2", "below 1", "from 7" */
export function binWords({ from, to }: Pick<BinPoint, 'from' | 'to'>, format: (x: number) => string): string {
  if (from !== null && to !== null) return `${format(from)} to ${format(to)}`;
  if (from !== null) return `from ${format(from)}`;
  return to === null ? 'all' : `below ${format(to)}`;
}

/** "1 to 2 years: median 0.1 %, middle 80 % −1.2 to 1.4 %; 312 checks of 240 owners" */
export function binReading(
  bin: BinPoint,
  { formatX, unitX }: { formatX: (x: number) => string; unitX: string },
): string {
  const middle = formatRange(bin.lower * 100, bin.upper * 100, { decimals: 1 });
  const median = formatNumber(bin.median * 100, { decimals: 1 });
  return `${binWords(bin, formatX)} ${unitX}: median ${median} %, middle 80 % ${middle} %; ${formatCount(bin.checks)} checks of ${formatCount(bin.owners)} owners`;
}
