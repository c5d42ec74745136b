import { thinSpace } from './numbers';

const months = ['Jan', 'Feb', 'Mar', 'Apr', 'May', 'Jun', 'Jul', 'Aug', 'Sep', 'Oct', 'Nov', 'Dec'];
const dayMs = 86_400_000;
/** Days of the mean Gregorian year: 97 leap years in 400. */
const daysPerYear = 365.2425;

const pad = (number: number) => String(number).padStart(2, '0');
const monthName = (month: number) => months[month - 1] ?? '';

const parts = (text: string): { year: number; month: number; day?: number } | undefined => {
  const match = /^(\d{4})-(\d{2})(?:-(\d{2}))?$/.exec(text);
  if (!match) return undefined;
  const [year, month] = [Number(match[1]), Number(match[2])];
  if (year < 1 || month < 1 || month > 12) return undefined;
  if (match[3] === undefined) return { year, month };
  const day = Number(match[3]);
  return day >= 1 && day <= daysInMonth(year, month) ? { year, month, day } : undefined;
};

const daysInMonth = (year: number, month: number): number => {
  const isLeap = (year % 4 === 0 && year % 100 !== 0) || year % 400 === 0;
  return month === 2 ? (isLeap ? 29 : 28) : [4, 6, 9, 11].includes(month) ? 30 : 31;
};

/** Whether a text is a day that exists, as 'YYYY-MM-DD'. */
export function isCalendarDate(text: string): boolean {
  return parts(text)?.day !== undefined;
}

/** Whether a text is a month, as 'YYYY-MM'. */
export function isCalendarMonth(text: string): boolean {
  return text.length === 7 && parts(text) !== undefined;
}

const required = (name: string, text: string) => {
  const found = parts(text);
  if (!found) throw new RangeError(`${name} requires YYYY-MM-DD or YYYY-MM, got "${text}"`);
  return found;
};

/** '2026-11-02' is "2 Nov 2026"; a month is formatted as one. @throws RangeError on anything else. */
export function formatDate(date: string): string {
  const { year, month, day } = required('formatDate', date);
  return day === undefined ? `${monthName(month)} ${year}` : `${day} ${monthName(month)} ${year}`;
}

/** '2026-11' (or a day in it) is "Nov 2026". @throws RangeError on anything else. */
export function formatMonth(month: string): string {
  const { year, month: number } = required('formatMonth', month);
  return `${monthName(number)} ${year}`;
}

/** An instant (ISO text or Date) in UTC: "2 Nov 2026, 14:05 UTC". @throws RangeError when it is none. */
export function formatInstant(instant: string | Date): string {
  const date = new Date(instant);
  if (Number.isNaN(date.getTime()))
    throw new RangeError(`formatInstant requires an instant, got "${instant}"`);
  const day = formatDate(calendarDateOf(date));
  return `${day}, ${pad(date.getUTCHours())}:${pad(date.getUTCMinutes())} UTC`;
}

/** The calendar day of an instant, in UTC or in the reader's own zone. */
export function calendarDateOf(instant: Date, zone: 'utc' | 'local' = 'utc'): string {
  const [year, month, day] =
    zone === 'utc'
      ? [instant.getUTCFullYear(), instant.getUTCMonth(), instant.getUTCDate()]
      : [instant.getFullYear(), instant.getMonth(), instant.getDate()];
  return `${String(year).padStart(4, '0')}-${pad(month + 1)}-${pad(day)}`;
}

/** A month stands for its 15th: the mean of its days, so that ages are off by half a month at most. */
const dayNumber = (name: string, text: string): number => {
  const { year, month, day = 15 } = required(name, text);
  return Date.UTC(year, month - 1, day) / dayMs;
};

/** Whole days from one day or month to another; a month counts as its 15th. @throws RangeError on malformed text. */
export function daysBetween(from: string, to: string): number {
  return dayNumber('daysBetween', to) - dayNumber('daysBetween', from);
}

/**
 * Years of 365.2425 days from one day or month to another. A month counts as its 15th; where one of the two is only a
 * month and the other lies in it, the answer is 0, so that a check soon after first use is never negative.
 * @throws RangeError on malformed text.
 */
export function yearsBetween(from: string, to: string): number {
  const isSameMonth = from.slice(0, 7) === to.slice(0, 7);
  const years = daysBetween(from, to) / daysPerYear;
  return isSameMonth && (from.length === 7 || to.length === 7) ? 0 : years;
}

/** The day (or month) some months later, held back to the last day of a shorter month. */
export function addMonths(date: string, count: number): string {
  const { year, month, day } = required('addMonths', date);
  const index = year * 12 + (month - 1) + count;
  const [newYear, newMonth] = [Math.floor(index / 12), (index % 12) + 1];
  const stem = `${String(newYear).padStart(4, '0')}-${pad(newMonth)}`;
  return day === undefined ? stem : `${stem}-${pad(Math.min(day, daysInMonth(newYear, newMonth)))}`;
}

/** How long before `now` an instant lies: "just now", "5 min ago", "3 h ago", "2 days ago", then its day. */
export function formatAgo(instant: string | Date, now: Date): string {
  const then = new Date(instant);
  const minutes = Math.floor((now.getTime() - then.getTime()) / 60_000);
  if (minutes < 1) return 'just now';
  if (minutes < 60) return `${minutes}${thinSpace}min ago`;
  const hours = Math.floor(minutes / 60);
  if (hours < 24) return `${hours}${thinSpace}h ago`;
  const days = Math.floor(hours / 24);
  if (days < 30) return days === 1 ? '1 day ago' : `${days} days ago`;
  return formatDate(calendarDateOf(then));
}
