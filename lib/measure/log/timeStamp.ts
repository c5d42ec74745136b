import { parseLogNumber } from './parseLogNumber';
import type { TimeFormat } from './logTypes';

/** Formats whose stamps carry a date, so that rows can be sorted by them. */
export const isDated = (format: TimeFormat) => !format.startsWith('elapsed') && format !== 'clock';
/** Formats that follow a wall clock, which may be set back an hour. */
export const isWallClock = (format: TimeFormat) => ['ymd', 'dmy', 'mdy', 'serialDays'].includes(format);

const secondsPer: Partial<Record<TimeFormat, number>> = {
  elapsedMs: 0.001,
  elapsedS: 1,
  elapsedMin: 60,
  elapsedH: 3600,
  epochS: 1,
  epochMs: 0.001,
  serialDays: 86400,
};

/** Days from 1899-12-30, where spreadsheets count from, to 1970-01-01. */
const serialEpochDays = 25569;

/** hh:mm, hh:mm:ss or hh:mm:ss.fff, with am or pm, with Z or an offset from UTC. */
export const clockPattern =
  /^(\d{1,4}):([0-5]\d)(?::([0-5]\d|60)(?:[.,](\d{1,9}))?)?\s*(?:([ap])\.?\s?m\.?)?\s*(z|utc|gmt|[+-]\d\d:?\d\d)?$/i;
/** A date of three parts; the month may be a word. */
export const datePattern = /^(\d{1,4})([-/.\s])(\d{1,2}|[a-zA-Z]{3,9})\2(\d{1,4})$/;
/** Days in front of an elapsed clock: "1d 02:03:04", "1.02:03:04". */
const elapsedDays = /^(\d{1,3})\s?(?:d(?:ays?)?\s*|\.)(?=\d{1,2}:)/i;

const monthWords = ['jan', 'feb', 'mar', 'apr', 'may', 'jun', 'jul', 'aug', 'sep', 'oct', 'nov', 'dec'];

/** Seconds of a clock time, NaN if it is none. */
export function parseClock(text: string, isElapsed: boolean): number {
  const match = clockPattern.exec(text);
  if (!match) return NaN;
  let hours = Number(match[1]);
  const half = match[5]?.toLowerCase();
  if (half) {
    if (hours < 1 || hours > 12) return NaN;
    hours = (hours % 12) + (half === 'p' ? 12 : 0);
  }
  if (!isElapsed && hours > 24) return NaN;
  const fraction = match[4] ? Number(`0.${match[4]}`) : 0;
  return hours * 3600 + Number(match[2]) * 60 + Number(match[3] ?? 0) + fraction - offsetSeconds(match[6]);
}

const offsetSeconds = (zone: string | undefined): number => {
  if (!zone || !/^[+-]/.test(zone)) return 0;
  const digits = zone.replace(':', '');
  return (
    (digits.startsWith('-') ? -1 : 1) * (Number(digits.slice(1, 3)) * 3600 + Number(digits.slice(3, 5)) * 60)
  );
};

/** Seconds since 1970 at the start of a day written in the order given; NaN if there is no such day. */
export function parseDay(text: string, order: 'ymd' | 'dmy' | 'mdy'): number {
  const match = datePattern.exec(text);
  if (!match) return NaN;
  const [, first = '', , second = '', third = ''] = match;
  const [yearText, monthText, dayText] =
    order === 'ymd'
      ? [first, second, third]
      : order === 'dmy'
        ? [third, second, first]
        : [third, first, second];
  const word = monthWords.indexOf(monthText.slice(0, 3).toLowerCase());
  const month = word >= 0 ? word + 1 : Number(monthText);
  const day = Number(dayText);
  const year = yearText.length <= 2 ? 2000 + Number(yearText) : Number(yearText);
  const ms = Date.UTC(year, month - 1, day);
  const date = new Date(ms);
  return date.getUTCMonth() === month - 1 && date.getUTCDate() === day ? ms / 1000 : NaN;
}

/** Where the clock begins behind a date, or -1. */
const clockStart = (text: string): number => text.search(/[T\s,]+\d{1,2}:/);

/**
 * Makes a reader of stamps in one format: text in, seconds out on the format's own scale (since 1970, since midnight
 * or since the start), NaN for what is no stamp.
 */
export function createStampParser(format: TimeFormat, decimal: '.' | ','): (text: string) => number {
  const parse = parserOf(format, decimal);
  // Longer texts are no stamps, and patterns would run over them slowly.
  return (text) => (text.length > 60 ? NaN : parse(text));
}

const parserOf = (format: TimeFormat, decimal: '.' | ','): ((text: string) => number) => {
  if (format === 'ymd' || format === 'dmy' || format === 'mdy') return createDateParser(format);
  if (format === 'clock') return (text) => parseClock(text.trim(), false);
  if (format === 'elapsedClock') {
    return (text) => {
      const days = elapsedDays.exec(text.trim());
      const clock = parseClock(text.trim().slice(days ? days[0].length : 0), true);
      return clock + (days ? Number(days[1]) * 86400 : 0);
    };
  }
  const scale = secondsPer[format] ?? 1;
  const shift = format === 'serialDays' ? serialEpochDays * 86400 : 0;
  return (text) => parseLogNumber(text, decimal) * scale - shift;
};

/** Rows of one day share their date, so the last one read is kept. */
const createDateParser = (order: 'ymd' | 'dmy' | 'mdy') => {
  let lastDay = '';
  let lastDayS = NaN;
  return (field: string): number => {
    const text = field.trim();
    const split = clockStart(text);
    const day = split < 0 ? text : text.slice(0, split);
    if (day !== lastDay) {
      lastDay = day;
      lastDayS = parseDay(day, order);
    }
    if (split < 0) return lastDayS;
    return lastDayS + parseClock(text.slice(split).replace(/^[T\s,]+/, ''), false);
  };
};
