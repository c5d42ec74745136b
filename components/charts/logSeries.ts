import { extentOf } from './chartScale';

/** A log's readings in order of time; null where the log had none. */
export interface LogSeries {
  timeS: readonly number[];
  voltageV: readonly (number | null)[];
  currentA: readonly (number | null)[];
}

export interface TimedValue {
  timeS: number;
  value: number;
}

/** One quantity's readings cut at its gaps, so that no line is drawn over what was not read. */
export function runsOf(timeS: readonly number[], values: readonly (number | null)[]): TimedValue[][] {
  const runs: TimedValue[][] = [];
  let run: TimedValue[] = [];
  timeS.forEach((time, index) => {
    const value = values[index];
    if (value === null || value === undefined || !Number.isFinite(value)) {
      if (run.length > 0) runs.push(run);
      run = [];
    } else run.push({ timeS: time, value });
  });
  if (run.length > 0) runs.push(run);
  return runs;
}

/**
 * A run with at most about `most` points that keeps its shape: of each stretch of readings the first, the lowest, the
 * highest and the last, in order of time.
 */
export function thinRun(run: readonly TimedValue[], most: number): readonly TimedValue[] {
  if (run.length <= most) return run;
  const stretch = Math.ceil(run.length / Math.max(1, Math.floor(most / 4)));
  const kept: TimedValue[] = [];
  for (let start = 0; start < run.length; start += stretch) {
    const part = run.slice(start, start + stretch);
    const first = part[0];
    if (!first) continue;
    const lowest = part.reduce((a, b) => (b.value < a.value ? b : a), first);
    const highest = part.reduce((a, b) => (b.value > a.value ? b : a), first);
    const chosen = new Set([first, lowest, highest, part.at(-1) ?? first]);
    kept.push(...[...chosen].sort((a, b) => a.timeS - b.timeS));
  }
  return kept;
}

/** A domain a little wider than its values; `withZero` draws it down or up to 0. */
export function paddedDomain(
  values: readonly (number | null)[],
  withZero: boolean,
): readonly [number, number] {
  const extent = extentOf(values.filter((value) => value !== null));
  if (!extent) return [0, 1];
  const [from, to] = withZero ? [Math.min(0, extent[0]), Math.max(0, extent[1])] : extent;
  const margin = (to - from || Math.abs(to) || 1) * 0.06;
  return [withZero && from === 0 ? 0 : from - margin, withZero && to === 0 ? 0 : to + margin];
}

const unitSteps = [
  { unit: 'h', seconds: 3600 },
  { unit: 'min', seconds: 60 },
  { unit: 's', seconds: 1 },
] as const;

/** The unit a time axis of this length is best read in. */
export function timeUnitOf(spanS: number): (typeof unitSteps)[number] {
  return unitSteps.find(({ seconds }) => spanS >= 2 * seconds) ?? unitSteps[2];
}
