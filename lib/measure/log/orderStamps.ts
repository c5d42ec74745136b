import { formatCount } from '@/lib/units';

import type { LogSamples, LogWarning } from './logTypes';
import { isDated, isWallClock } from './timeStamp';

const daySeconds = 86_400;
const hourSeconds = 3600;
/** A longer run of falling stamps is no mere shuffle of rows. */
const longestShuffle = 5;

/** Readings in true order: seconds from the first stamp, which stands apart on the format's own scale. */
export interface OrderedSamples {
  samples: LogSamples;
  /** First stamp as written, on the format's own scale. */
  originS: number;
  /** Usual time between rows, s. */
  stepS: number;
  warnings: LogWarning[];
}

/**
 * Puts readings in the order in which they were taken. Clock times that pass midnight (or noon, on a clock without
 * am and pm) go on; a count that starts again goes on where it stopped; a clock set back an hour is put forward; rows
 * out of place are sorted in; a log written newest first is turned round. All of it is counted and said.
 */
export function orderStamps(samples: LogSamples): OrderedSamples {
  const warnings: LogWarning[] = [];
  let ordered = samples;
  if (isNewestFirst(samples.timeS)) {
    ordered = permute(
      samples,
      Uint32Array.from(samples.timeS, (_, index) => samples.timeS.length - 1 - index),
    );
    warnings.push({
      code: 'newestFirst',
      text: 'The log runs from the newest row to the oldest; it was turned round.',
    });
  }
  const stepS = usualStep(ordered.timeS);
  const { timeS, late } = straighten(ordered, stepS, warnings);
  ordered = { ...ordered, timeS };
  if (late > 0) {
    const order = Uint32Array.from(timeS, (_, index) => index);
    order.sort((one, other) => (timeS[one] ?? 0) - (timeS[other] ?? 0) || one - other);
    ordered = permute(ordered, order);
  }
  const times = ordered.timeS;
  const originS = times[0] ?? 0;
  let duplicates = 0;
  let firstDuplicate = 0;
  for (let index = times.length - 1; index >= 0; index -= 1) {
    if (index > 0 && times[index] === times[index - 1]) {
      duplicates += 1;
      firstDuplicate = ordered.row[index] ?? 0;
    }
    times[index] = (times[index] ?? 0) - originS;
  }
  if (duplicates > 0) {
    warnings.push({
      code: 'duplicateStamps',
      text: `${formatCount(duplicates)} rows repeat the time of the row before; they add no time.`,
      count: duplicates,
      atRow: firstDuplicate,
    });
  }
  return { samples: ordered, originS, stepS, warnings };
}

const isNewestFirst = (timeS: Float64Array): boolean => {
  let falls = 0;
  let rises = 0;
  for (let index = 1; index < timeS.length; index += 1) {
    const step = (timeS[index] ?? 0) - (timeS[index - 1] ?? 0);
    if (step < 0) falls += 1;
    else if (step > 0) rises += 1;
  }
  return falls > 2 && falls > 2 * rises;
};

/** Median of the rising steps, of at most some 4,000 of them. */
const usualStep = (timeS: Float64Array): number => {
  const stride = Math.max(1, Math.floor(timeS.length / 4000));
  const steps: number[] = [];
  for (let index = 1; index < timeS.length; index += stride) {
    const step = (timeS[index] ?? 0) - (timeS[index - 1] ?? 0);
    if (step > 0) steps.push(step);
  }
  return steps.sort((one, other) => one - other)[Math.floor(steps.length / 2)] ?? 1;
};

const permute = (samples: LogSamples, order: Uint32Array): LogSamples => {
  const pick = (values: Float64Array) => Float64Array.from(order, (index) => values[index] ?? NaN);
  const pickOrNull = (values: Float64Array | null) => (values ? pick(values) : null);
  return {
    ...samples,
    timeS: pick(samples.timeS),
    currentA: pick(samples.currentA),
    voltageV: pickOrNull(samples.voltageV),
    powerW: pickOrNull(samples.powerW),
    temperatureC: pickOrNull(samples.temperatureC),
    lowestCellV: pickOrNull(samples.lowestCellV),
    highestCellV: pickOrNull(samples.highestCellV),
    counterAh: pickOrNull(samples.counterAh),
    row: Int32Array.from(order, (index) => samples.row[index] ?? 0),
  };
};

/** What happened at rows whose stamp falls. */
const happenings = {
  midnight: 'The clock passes midnight; the times go on into the next day.',
  twelveHour: 'The clock starts again at 1 after 12 without am or pm; the times go on.',
  restart: 'The count of time starts again; the log was joined there as if no time had passed.',
  setBack: 'The clock was set back an hour; later times were put forward by it.',
} as const;
type Happening = keyof typeof happenings;

/** Adds what a clock loses at midnight, at a restart or when set back; counts rows that are merely out of place. */
const straighten = (
  { timeS: raw, timeFormat, row }: LogSamples,
  stepS: number,
  warnings: LogWarning[],
): { timeS: Float64Array; late: number } => {
  const timeS = new Float64Array(raw.length);
  const seen = new Map<Happening, { count: number; atRow: number }>();
  const isHalfDayClock = timeFormat === 'clock' && raw.every((stamp) => stamp < 13 * hourSeconds);
  let shift = 0;
  let high = -Infinity;
  let late = 0;
  let firstLate = 0;
  for (let index = 0; index < raw.length; index += 1) {
    let stamp = (raw[index] ?? 0) + shift;
    // Just after midnight a row from just before it may still come.
    if (timeFormat === 'clock' && shift > 0 && stamp - high > daySeconds / 2) stamp -= daySeconds;
    if (stamp < high) {
      const what = happeningAt(raw, index, high - shift, timeFormat, isHalfDayClock);
      if (what === 'late') {
        late += 1;
        firstLate ||= row[index] ?? 0;
      } else {
        const drop = high - stamp;
        shift += {
          midnight: daySeconds,
          twelveHour: daySeconds / 2,
          restart: drop + stepS,
          setBack: hourSeconds,
        }[what];
        stamp = (raw[index] ?? 0) + shift;
        const before = seen.get(what);
        seen.set(what, { count: (before?.count ?? 0) + 1, atRow: before?.atRow ?? row[index] ?? 0 });
      }
    }
    timeS[index] = stamp;
    high = Math.max(high, stamp);
  }
  for (const [what, where] of seen) warnings.push({ code: what, text: happenings[what], ...where });
  if (late > 0) {
    const text = `${formatCount(late)} rows are out of order in time; they were sorted in.`;
    warnings.push({ code: 'outOfOrder', text, count: late, atRow: firstLate });
  }
  return { timeS, late };
};

/** Why the stamp at `index` lies below the highest before it (both on the scale as written). */
const happeningAt = (
  raw: Float64Array,
  index: number,
  high: number,
  timeFormat: LogSamples['timeFormat'],
  isHalfDayClock: boolean,
): Happening | 'late' => {
  const drop = high - (raw[index] ?? 0);
  if (timeFormat === 'clock' && isHalfDayClock && drop > 10 * hourSeconds && drop <= 12 * hourSeconds)
    return 'twelveHour';
  if (timeFormat === 'clock' && drop > daySeconds / 2) return 'midnight';
  const isSetBack = isWallClock(timeFormat) && Math.abs(drop - hourSeconds) < 300;
  if (isDated(timeFormat) && !isSetBack) return 'late';
  for (let ahead = index + 1; ahead <= index + longestShuffle && ahead < raw.length; ahead += 1) {
    if ((raw[ahead] ?? 0) >= high) return 'late';
  }
  const isTail = index + longestShuffle >= raw.length;
  if (isSetBack) return isTail ? 'late' : 'setBack';
  // Near the end a small step back is a row out of place, a fall to the start is a new count.
  return isTail && drop < high / 2 ? 'late' : 'restart';
};
