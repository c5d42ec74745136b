import { defaultSettings } from '@/lib/measure';
import { calendarDateOf, currentOfIt } from '@/lib/units';

import type { TestRun } from './testRun';

/** How long a full bank lasts at the reference rate: 1 / 0.2 h. A weaker bank ends sooner. */
export const expectedDischargeS = 3600 / defaultSettings.referenceIt;

/** Rest between the charge and the load; common practice, no source. */
export const restS = 3600;

/** Before the expected end the cells are watched closely: the voltage falls fast there. Judgement. */
export const watchBeforeS = 45 * 60;

/** The load at the reference rate: amps, and watts at the cells' nominal voltage. */
export function referenceLoad({
  ratedAh,
  series,
  nominalV,
}: {
  ratedAh: number;
  series: number;
  nominalV: number;
}) {
  const amps = currentOfIt(defaultSettings.referenceIt, ratedAh);
  return { amps, watts: amps * series * nominalV };
}

const msOf = (instant: string | undefined) => (instant === undefined ? undefined : Date.parse(instant));

/** Seconds from one stage's beginning to another's; undefined before both have begun. */
function secondsBetween(
  { startedAt }: TestRun,
  from: keyof TestRun['startedAt'],
  to: keyof TestRun['startedAt'],
) {
  const [begin, end] = [msOf(startedAt[from]), msOf(startedAt[to])];
  return begin === undefined || end === undefined || end < begin ? undefined : (end - begin) / 1000;
}

/** What the times of a test say of its reading, as the form's fields hold them. */
export function timedReadings(run: TestRun): Record<string, string> {
  const restedS = secondsBetween(run, 'rest', 'discharge');
  const dischargedS = secondsBetween(run, 'discharge', 'recharge');
  const began = run.startedAt.discharge;
  return {
    ...(restedS === undefined ? {} : { restMinutes: String(Math.round(restedS / 60)) }),
    // To the minute: the press of a button is no better.
    ...(dischargedS === undefined ? {} : { durationS: clockOfMinutes(dischargedS) }),
    ...(began === undefined ? {} : { testedOn: calendarDateOf(new Date(began), 'local') }),
  };
}

const clockOfMinutes = (seconds: number) => {
  const minutes = Math.round(seconds / 60);
  return `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, '0')}`;
};
