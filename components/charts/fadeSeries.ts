import { extentOf, niceStep } from './chartScale';

export type FadeStatus = 'measured' | 'projected' | 'extrapolated';

/** A point of the fade curve: share of rated capacity left (0..1) with its 90 % range, at years or EFC. */
export interface FadePoint {
  x: number;
  soh: number;
  lower: number;
  upper: number;
  status: FadeStatus;
}

export interface FadeCheck {
  x: number;
  soh: number;
}

export interface FadeClaim {
  x: number;
  /** Direct label: "the label, at this use". */
  label: string;
}

/** Checks of one stretch of x: median and middle 80 %, shares of rated capacity. */
export interface FadeBin {
  from: number;
  to: number;
  median: number;
  lower: number;
  upper: number;
}

export const endOfLifeFraction = 0.8;
const mostDrawn = 1500;

/**
 * The curve cut where its standing changes; each part begins with the last point of the part before, so that lines and
 * bands meet.
 */
export function fadeParts(curve: readonly FadePoint[]): { status: FadeStatus; points: FadePoint[] }[] {
  const parts: { status: FadeStatus; points: FadePoint[] }[] = [];
  for (const point of curve) {
    const last = parts.at(-1);
    if (last?.status === point.status) last.points.push(point);
    else parts.push({ status: point.status, points: [...(last?.points.slice(-1) ?? []), point] });
  }
  return parts.filter((part) => part.points.length > 1);
}

/** At most `most` checks, evenly picked along x, so that dense years stay denser than sparse ones. */
export function thinChecks(checks: readonly FadeCheck[], most = mostDrawn): readonly FadeCheck[] {
  if (checks.length <= most) return checks;
  const sorted = [...checks].sort((a, b) => a.x - b.x);
  return Array.from(
    { length: most },
    (_, index) => sorted[Math.floor((index * sorted.length) / most)],
  ).filter((check) => check !== undefined);
}

export interface FadeDomain {
  x: readonly [number, number];
  y: readonly [number, number];
}

/**
 * What the axes span: x from 0 to a round value past everything drawn, though a claim further than 1.3 times the rest
 * is held at the edge, and at least to `leastX`; y down to 70 % or the tens below the lowest reading, and up past 100 %.
 */
export function fadeDomain(
  checks: readonly FadeCheck[],
  curve: readonly FadePoint[],
  claims: readonly FadeClaim[],
  lifeX: number | undefined,
  leastX = 0,
): FadeDomain {
  const measuredEnd = Math.max(
    leastX,
    extentOf(checks.map((check) => check.x))?.[1] ?? 0,
    extentOf(curve.map((point) => point.x))?.[1] ?? 0,
    lifeX ?? 0,
  );
  const farthestClaim = extentOf(claims.map((claim) => claim.x))?.[1] ?? 0;
  const end =
    Math.max(measuredEnd, Math.min(farthestClaim, measuredEnd > 0 ? measuredEnd * 1.3 : farthestClaim)) || 1;
  const step = niceStep(end, 8);
  const heights = extentOf([
    ...checks.map((check) => check.soh),
    ...curve.flatMap((point) => [point.soh, Math.max(point.lower, point.soh - 0.2)]),
  ]) ?? [endOfLifeFraction, 1];
  const bottom = Math.min(0.7, Math.floor(heights[0] * 10 - 1e-9) / 10);
  const top = Math.max(1.02, Math.min(1.2, heights[1] + 0.01));
  return { x: [0, Math.ceil(end / step - 1e-9) * step], y: [Math.max(0, bottom), top] };
}

/** The curve at x, straight between its points; undefined outside it. */
export function fadeAt(curve: readonly FadePoint[], x: number): FadePoint | undefined {
  const index = curve.findIndex((point) => point.x >= x);
  const after = curve[index];
  if (!after) return undefined;
  const before = curve[index - 1];
  if (!before) return after.x === x ? after : undefined;
  const share = after.x === before.x ? 1 : (x - before.x) / (after.x - before.x);
  const mix = (from: number, to: number) => from + share * (to - from);
  return {
    x,
    soh: mix(before.soh, after.soh),
    lower: mix(before.lower, after.lower),
    upper: mix(before.upper, after.upper),
    status: after.status,
  };
}
