import { assertIntervals, type IntervalObservation } from './observation';

/** An interval (left, right] in which the estimate puts mass; where inside it cannot be told. */
export interface TurnbullInterval {
  left: number;
  right: number;
  mass: number;
  /** Share without the event after the interval. */
  survivalAfter: number;
}

export interface TurnbullFit {
  ok: true;
  intervals: TurnbullInterval[];
  logLikelihood: number;
  /** Largest mean score of the intervals: 1 at the maximum (Kuhn and Tucker). */
  kuhnTucker: number;
  iterations: number;
}

const MAX_ITERATIONS = 20_000;
// Observations times this bounds what is left of the log-likelihood to gain.
const KUHN_TUCKER_GOAL = 1e-8;
const CHANGE_GOAL = 1e-10;
const NEGLIGIBLE = 1e-8;
const SHRINK = 1e-3;

/**
 * Nonparametric maximum-likelihood estimate of the survival curve when events are known only to lie in
 * intervals (left, right] and subjects may have come under observation late. Mass can only lie between a
 * left end (or entry) and the next right end; the masses solve the self-consistency equations, with the
 * expected number of subjects never seen added for delayed entry. Sources: Turnbull 1976, J. R. Statist.
 * Soc. B 38, 290-295; Alioum and Commenges 1996, Biometrics 52, 512-524 (places of mass with late entry).
 *
 * With late entry the curve is that of subjects still without the event at the earliest entry, and, as
 * with any estimate from few subjects at risk, one early event can bring it far down. Returns
 * `{ ok: false }` for no observations or no convergence; intervals of negligible mass are left out.
 * Throws RangeError unless 0 <= entry <= left < right.
 */
export function turnbull(
  observations: readonly IntervalObservation[],
): TurnbullFit | { ok: false; reason: 'noObservations' | 'notConverged' } {
  assertIntervals(observations, 'turnbull', false);
  if (observations.length === 0) return { ok: false, reason: 'noObservations' };
  const places = placesOfMass(observations);
  const ranges = observations.map((observation) => rangesOf(observation, places));
  let mass = new Float64Array(places.length).fill(1 / places.length);
  for (let iterations = 1; iterations <= MAX_ITERATIONS; iterations++) {
    const first = selfConsistent(mass, ranges);
    if (first.kuhnTucker < 1 + KUHN_TUCKER_GOAL && first.change < CHANGE_GOAL) {
      const { logLikelihood, kuhnTucker } = first;
      return { ok: true, intervals: withMass(places, mass), logLikelihood, kuhnTucker, iterations };
    }
    const second = selfConsistent(first.next, ranges);
    const ahead = extrapolated(mass, first.next, second.next);
    const leapt = selfConsistent(ahead, ranges);
    mass = leapt.logLikelihood >= second.logLikelihood ? leapt.next : second.next;
  }
  return { ok: false, reason: 'notConverged' };
}

// Squared extrapolation of two rounds (Varadhan and Roland 2008, Scand. J. Statist. 35, 335-353, scheme S3):
// plain rounds need tens of thousands where masses fade away. A mass that would turn negative is cut down.
function extrapolated(start: Float64Array, once: Float64Array, twice: Float64Array): Float64Array {
  let moved = 0;
  let bent = 0;
  for (let j = 0; j < start.length; j++) {
    const step = (once[j] as number) - (start[j] as number);
    const bend = (twice[j] as number) - (once[j] as number) - step;
    moved += step * step;
    bent += bend * bend;
  }
  const reach = bent > 0 ? Math.max(Math.sqrt(moved / bent), 1) : 1;
  const ahead = twice.map((value, j) => {
    const step = (once[j] as number) - (start[j] as number);
    const bend = value - (once[j] as number) - step;
    return Math.max((start[j] as number) + 2 * reach * step + reach * reach * bend, value * SHRINK);
  });
  const total = ahead.reduce((sum, value) => sum + value, 0);
  return ahead.map((value) => value / total);
}

/** Share without the event at `time`: the curve's value before and after an interval around it. */
export function turnbullSurvival(fit: TurnbullFit, time: number): { lower: number; upper: number } {
  let lower = 1;
  let upper = 1;
  for (const { left, right, mass } of fit.intervals) {
    if (right <= time) upper -= mass;
    if (left < time) lower -= mass;
  }
  return { lower: Math.max(lower, 0), upper: Math.max(upper, 0) };
}

interface Place {
  left: number;
  right: number;
}

function placesOfMass(observations: readonly IntervalObservation[]): Place[] {
  const lefts = new Set(observations.map(({ left }) => left));
  const rights = new Set(observations.map(({ right }) => right));
  for (const { entry = 0 } of observations) if (entry > 0) rights.add(entry);
  // (left, right]: an interval that ends at a time comes before one that begins there.
  const marks = [
    ...[...lefts].map((time) => ({ time, isLeft: true })),
    ...[...rights].map((time) => ({ time, isLeft: false })),
  ].sort((a, b) => (a.time === b.time ? Number(a.isLeft) - Number(b.isLeft) : a.time - b.time));
  return marks.flatMap(({ time, isLeft }, m) => {
    const next = marks[m + 1];
    return isLeft && next && !next.isLeft ? [{ left: time, right: next.time }] : [];
  });
}

interface Ranges {
  /** Places the event can lie in: from .. to - 1. */
  from: number;
  to: number;
  /** Places before this one were over at entry. */
  entered: number;
}

function rangesOf({ left, right, entry = 0 }: IntervalObservation, places: readonly Place[]): Ranges {
  const inside = places.flatMap((place, j) => (place.left >= left && place.right <= right ? [j] : []));
  const entered = places.filter((place) => place.left < entry).length;
  return { from: inside[0] as number, to: (inside[inside.length - 1] as number) + 1, entered };
}

// One round of the self-consistency equations, with the likelihood and the scores where it began.
function selfConsistent(mass: Float64Array, ranges: readonly Ranges[]) {
  const { score, truncated, total, logLikelihood } = expectation(mass, ranges);
  let kuhnTucker = 0;
  let change = 0;
  const next = mass.map((value, j) => {
    const weight = ((score[j] as number) + (truncated[j] as number)) / total;
    kuhnTucker = Math.max(kuhnTucker, weight);
    change = Math.max(change, Math.abs(value * weight - value));
    return value * weight;
  });
  return { next, logLikelihood, kuhnTucker, change };
}

// Places are in order and each observation covers a run of them, so sums over runs come from running
// totals and the cost of a round is observations + places.
function expectation(mass: Float64Array, ranges: readonly Ranges[]) {
  const running = new Float64Array(mass.length + 1);
  for (let j = 0; j < mass.length; j++) running[j + 1] = (running[j] as number) + (mass[j] as number);
  const all = running[mass.length] as number;
  const steps = new Float64Array(mass.length + 1);
  const lateSteps = new Float64Array(mass.length + 1);
  const add = (array: Float64Array, j: number, value: number) => {
    array[j] = (array[j] as number) + value;
  };
  let total = 0;
  let logLikelihood = 0;
  for (const { from, to, entered } of ranges) {
    const inside = (running[to] as number) - (running[from] as number);
    const seen = all - (running[entered] as number);
    add(steps, from, 1 / inside);
    add(steps, to, -1 / inside);
    if (entered > 0) {
      add(lateSteps, 0, 1 / seen);
      add(lateSteps, entered, -1 / seen);
    }
    total += all / seen;
    logLikelihood += Math.log(inside / seen);
  }
  for (let j = 1; j < mass.length; j++) {
    add(steps, j, steps[j - 1] as number);
    add(lateSteps, j, lateSteps[j - 1] as number);
  }
  return { score: steps, truncated: lateSteps, total, logLikelihood };
}

function withMass(places: readonly Place[], mass: Float64Array): TurnbullInterval[] {
  let survivalAfter = 1;
  return places.flatMap(({ left, right }, j) => {
    const value = mass[j] as number;
    survivalAfter = Math.max(survivalAfter - value, 0);
    return value > NEGLIGIBLE ? [{ left, right, mass: value, survivalAfter }] : [];
  });
}
