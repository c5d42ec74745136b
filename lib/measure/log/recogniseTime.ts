import { parseLogNumber } from './parseLogNumber';
import { clockPattern, datePattern, parseClock } from './timeStamp';
import type { TimeFormat } from './logTypes';

/** The format that sample stamps are written in; `choices` are asked about when they cannot be told apart. */
export interface TimeGuess {
  format: TimeFormat;
  choices: TimeFormat[];
}

const certain = (format: TimeFormat): TimeGuess => ({ format, choices: [] });

/** Tells the format of stamps from a sample of them and the unit in the column's name, or null when they are none. */
export function recogniseTime(stamps: string[], unit: string | null, decimal: '.' | ','): TimeGuess | null {
  const filled = stamps.map((stamp) => stamp.trim()).filter((stamp) => stamp !== '');
  if (filled.length === 0) return null;
  const most = (test: (stamp: string) => boolean) => filled.filter(test).length >= filled.length * 0.8;
  const dayPart = (stamp: string) => stamp.replace(/[T\s,]+\d{1,2}:.*$/, '');
  if (most((stamp) => datePattern.test(dayPart(stamp)))) return recogniseDate(filled.map(dayPart));
  const withoutDays = (stamp: string) => stamp.replace(/^\d{1,3}\s?(?:d(?:ays?)?\s*|\.)(?=\d{1,2}:)/i, '');
  if (most((stamp) => clockPattern.test(withoutDays(stamp)))) return recogniseClock(filled, withoutDays);
  const numbers = filled
    .map((stamp) => parseLogNumber(stamp, decimal))
    .filter((value) => !Number.isNaN(value));
  if (numbers.length < filled.length * 0.8) return null;
  return recogniseCount(numbers, unit);
}

const recogniseDate = (days: string[]): TimeGuess => {
  const parts = days.map((day) => datePattern.exec(day)).filter((match) => match !== null);
  if (parts.some((match) => (match[1] ?? '').length === 4)) return certain('ymd');
  // A month in letters stands second here, and dates with points have the day first wherever they are used.
  if (parts.some((match) => /[a-z]/i.test(match[3] ?? '') || match[2] === '.')) return certain('dmy');
  if (parts.some((match) => Number(match[1]) > 12)) return certain('dmy');
  if (parts.some((match) => Number(match[3]) > 12)) return certain('mdy');
  return { format: 'dmy', choices: ['dmy', 'mdy'] };
};

const recogniseClock = (stamps: string[], withoutDays: (stamp: string) => string): TimeGuess => {
  const hasDays = stamps.some((stamp) => withoutDays(stamp) !== stamp);
  const hours = stamps.map((stamp) => Number(/^\d+/.exec(stamp)?.[0] ?? NaN));
  const start = parseClock(stamps[0] ?? '', true);
  // A count of hours, minutes and seconds starts near zero or runs past a day; a time of day seldom does either.
  return certain(hasDays || hours.some((hour) => hour > 24) || start < 60 ? 'elapsedClock' : 'clock');
};

const elapsedOfUnit: Record<string, TimeFormat> = {
  s: 'elapsedS',
  ms: 'elapsedMs',
  min: 'elapsedMin',
  h: 'elapsedH',
};

const recogniseCount = (numbers: number[], unit: string | null): TimeGuess => {
  const first = numbers[0] ?? 0;
  // Counts since 1970 of the years 2001 to 2065.
  if (first > 1e9 && first < 3e9) return certain('epochS');
  if (first > 1e12 && first < 3e12) return certain('epochMs');
  const elapsed = unit !== null && Object.hasOwn(elapsedOfUnit, unit) ? elapsedOfUnit[unit] : undefined;
  if (elapsed) return certain(elapsed);
  const steps = numbers.slice(1).map((value, index) => value - (numbers[index] ?? 0));
  const positive = steps.filter((step) => step > 0).sort((one, other) => one - other);
  const step = positive[Math.floor(positive.length / 2)] ?? 1;
  // Days of the years 2009 to 2064, in steps below an hour.
  if (first > 40_000 && first < 60_000 && step < 1 / 24 && numbers.some((value) => value % 1 !== 0)) {
    return certain('serialDays');
  }
  const likely: TimeFormat = step >= 100 ? 'elapsedMs' : step < 0.05 ? 'elapsedH' : 'elapsedS';
  return { format: likely, choices: ['elapsedS', 'elapsedMs', 'elapsedMin', 'elapsedH'] };
};
