import { formatPercent } from '@/lib/units';
import { extentOf, niceStep } from './chartScale';

/** One check of a bank: its SOH with the ± of its uncertainty at 95 %, both 0..1. */
export interface HistoryCheck {
  id: string;
  x: number;
  soh: number;
  plusMinus: number;
  /** The check the page is about; drawn as a square in rust with its words. */
  remark?: string;
  /** Not in the fit: turned away, withdrawn, recalled; drawn hollow and unconnected. */
  isLeftOut?: boolean;
  /** In words, for readings and the table: "2 Nov 2026". */
  when: string;
}

/** Where 50 % and 80 % of banks used like this one lie, at x. */
export interface ExpectedBand {
  x: number;
  inner: readonly [number, number];
  outer: readonly [number, number];
}

export interface HistoryDomain {
  x: readonly [number, number];
  y: readonly [number, number];
}

/** What the axes span: from new to a little past the last check, and all that is drawn with its ranges. */
export function historyDomain(checks: readonly HistoryCheck[], band: readonly ExpectedBand[]): HistoryDomain {
  const end = extentOf([...checks.map((check) => check.x), ...band.map((point) => point.x)])?.[1] ?? 1;
  const step = niceStep(Math.max(end, 0.5), 6);
  const heights = extentOf([
    ...checks.flatMap((check) => [check.soh - check.plusMinus, check.soh + check.plusMinus]),
    ...band.flatMap((point) => point.outer),
  ]) ?? [0.8, 1];
  const bottom = Math.floor((heights[0] - 0.005) * 20) / 20;
  const top = Math.ceil((heights[1] + 0.005) * 20) / 20;
  return { x: [0, Math.ceil(end / step + 0.15) * step], y: [Math.max(0, bottom), Math.max(1, top)] };
}

/** The checks that the bank's line joins, in order. */
export function joinedChecks(checks: readonly HistoryCheck[]): HistoryCheck[] {
  return checks.filter((check) => !check.isLeftOut).sort((a, b) => a.x - b.x);
}

/** "2 Nov 2026: 93.8 ± 1.0 %, left out of the fit". */
export function historyReading(check: HistoryCheck): string {
  const figure = `${formatPercent(check.soh, 1)} ± ${formatPercent(check.plusMinus, 1)}`;
  return [`${check.when}: ${figure}`, check.remark, check.isLeftOut && 'left out of the fit']
    .filter(Boolean)
    .join(', ');
}
