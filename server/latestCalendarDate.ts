import { calendarDateOf } from '@/lib/units';

/** The farthest any local clock is ahead of UTC, ms. */
const aheadMs = 14 * 3_600_000;

/** The latest day it is anywhere: an owner's "today" may be a day past UTC's. */
export function latestCalendarDate(now: Date): string {
  return calendarDateOf(new Date(now.getTime() + aheadMs));
}
