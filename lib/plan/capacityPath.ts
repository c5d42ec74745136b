import type { TypicalFade, Use } from '@/lib/fit/pooled/published';

/** A night's energy that stays the same while the bank that gives it fades. */
export interface NightUse {
  /** Energy taken out of the cells in a night, Wh. */
  cellWh: number;
  nightsPerYear: number;
  /** Rated energy of the bank, Wh. */
  ratedWh: number;
  /** The deepest the limits let a night go, share of the present capacity, 0..1. */
  usableFraction: number;
  dischargeIt: number;
  temperatureC: number;
  socMeanFraction: number;
  isClamped: boolean;
}

export interface PathPoint {
  years: number;
  /** Capacity left, share of the rating. */
  capacityFraction: number;
  /** Depth of the night, share of the present capacity; above `usableFraction` it no longer fits. */
  wantedDepthFraction: number;
  /** Energy taken out of the cells since new, Wh. */
  takenWh: number;
}

export interface CapacityPath {
  points: PathPoint[];
  /** Years until the end share, null when the horizon comes first. */
  lifeYears: number | null;
  /** The first year in which the night's energy no longer fits, null when it always does. */
  shortYears: number | null;
  /** The use to date at the last point: depth weighted by the charge taken, full cycles a year as they were. */
  use: Use;
}

const stepYears = 0.25;

/**
 * Follows a bank that gives the same energy each night: depth = energy / present capacity rises as the bank fades, and the
 * fade follows the mean depth to date (weighted by charge, as the pool's own conditions to date are).
 * @param pace multiplies the fade: 1 for the typical bank
 * @param horizonYears where to stop when the end share has not come
 * @param endShare the end of the life, share of the rating
 */
export function capacityPath(
  fade: TypicalFade,
  night: NightUse,
  { pace = 1, horizonYears, endShare = 0.8 }: { pace?: number; horizonYears: number; endShare?: number },
): CapacityPath {
  const wantedAt = (capacity: number) => night.cellWh / (night.ratedWh * capacity);
  const points: PathPoint[] = [pointAt(0, fade.start, wantedAt(fade.start), 0)];
  let shortYears = points[0]!.wantedDepthFraction > night.usableFraction ? 0 : null;
  let takenWh = 0;
  let depthWh = 0;
  let use = meanUse(night, Math.min(points[0]!.wantedDepthFraction, night.usableFraction), 1);
  for (let years = 0; years < horizonYears;) {
    const last = points.at(-1)!;
    const next = Math.min(years + stepYears, horizonYears);
    const depth = Math.min(last.wantedDepthFraction, night.usableFraction);
    const taken = depth * last.capacityFraction * night.ratedWh * night.nightsPerYear * (next - years);
    takenWh += taken;
    depthWh += taken * depth;
    use = meanUse(night, depthWh / takenWh, takenWh / night.ratedWh / next);
    const capacity = fade.start * (1 - Math.min(pace * fade.at(use, next).fade, 0.95));
    const point = pointAt(next, capacity, wantedAt(capacity), takenWh);
    if (shortYears === null && point.wantedDepthFraction > night.usableFraction)
      shortYears = crossing(last, point, (one) => one.wantedDepthFraction, night.usableFraction);
    if (capacity <= endShare) {
      const lifeYears = crossing(last, point, (one) => one.capacityFraction, endShare);
      const share = (lifeYears - last.years) / (next - last.years);
      points.push(
        pointAt(lifeYears, endShare, wantedAt(endShare), last.takenWh + share * (takenWh - last.takenWh)),
      );
      return { points, lifeYears, shortYears, use };
    }
    points.push(point);
    years = next;
  }
  return { points, lifeYears: null, shortYears, use };
}

function pointAt(
  years: number,
  capacityFraction: number,
  wantedDepthFraction: number,
  takenWh: number,
): PathPoint {
  return { years, capacityFraction, wantedDepthFraction, takenWh };
}

function meanUse(night: NightUse, depthFraction: number, efcPerYear: number): Use {
  const { dischargeIt, temperatureC, socMeanFraction, isClamped } = night;
  return { depthFraction, dischargeIt, temperatureC, socMeanFraction, isClamped, efcPerYear };
}

/** Years at which a figure of two points passes a level, on the straight line between them. */
function crossing(from: PathPoint, to: PathPoint, of: (point: PathPoint) => number, level: number): number {
  const share = (level - of(from)) / (of(to) - of(from));
  return from.years + Math.min(Math.max(share, 0), 1) * (to.years - from.years);
}
