import { daysBetween, yearsBetween } from '@/lib/units';

import type { PlannedBank } from './people';
import type { Draws } from './random';
import type { DemoEvent } from './types';

/** Last day a check was made on and settled. */
export const lastDay = '2026-11-20';

/** What happens to a bank: when it is checked, and what befalls it. */
export interface LifeCourse {
  testedOn: string[];
  events: DemoEvent[];
  /** From this day on the bank gives only a share of its capacity. */
  failure: { happenedOn: string; keptFraction: number } | null;
  /** Cells drift apart, which costs capacity each year until they are evened out again. */
  driftPerYear: number;
}

/** Chance of a failure in a bank's year: 0.8 per 100 bank-years. */
const failuresPerYear = 0.008;
const checkAttendance = 0.635;
const driftersShare = 0.06;

/** Draws when a bank was checked and what happened to it. */
export function drawLifeCourse(draws: Draws, firstUseMonth: string, plan: PlannedBank | null): LifeCourse {
  const calm = { events: [], failure: null, driftPerYear: 0 };
  if (plan) return plannedCourse(draws, plan);
  const start = `${firstUseMonth}-15`;
  const years = yearsBetween(start, lastDay);
  const all = drawDays(draws, start, years);
  const failsAt = -Math.log(1 - draws.uniform(0, 1)) / failuresPerYear;
  if (failsAt < years) return failingCourse(draws, all, later(start, failsAt));
  const isDrifting = draws.chance(driftersShare);
  const end = draws.weighted({ goesOn: 0.83, stops: 0.13, sold: 0.02, retired: 0.02 });
  const testedOn = end === 'goesOn' ? all : all.slice(0, draws.int(1, all.length));
  const ending = end === 'sold' || end === 'retired' ? [endEvent(draws, testedOn, end)] : [];
  if (isDrifting && testedOn.length >= 3) {
    const before = testedOn[draws.int(2, testedOn.length - 1)]!;
    const evened = event(
      draws,
      later(before, -draws.uniform(0.02, 0.1)),
      'rebalanced',
      'Cells evened out in parallel.',
    );
    return { ...calm, testedOn, driftPerYear: 0.012, events: [evened, ...ending] };
  }
  return { ...calm, testedOn, events: [...smallEvents(draws, testedOn), ...ending] };
}

function plannedCourse(draws: Draws, { testedOn, pending }: PlannedBank): LifeCourse {
  const calm = { testedOn, events: [], failure: null, driftPerYear: 0 };
  const last = testedOn[testedOn.length - 1]!;
  if (pending === 'riseAfterRebalance') {
    const note = 'Took the bank apart and charged all cells in parallel to 3.60 V.';
    return { ...calm, driftPerYear: 0.012, events: [event(draws, later(last, -0.06), 'rebalanced', note)] };
  }
  if (pending === 'realFailure') {
    const happenedOn = later(last, -0.12);
    const note =
      'Cell 11 lies 0.4 V under the others in every discharge and gets warm. Bank taken out of use.';
    return {
      ...calm,
      failure: { happenedOn, keptFraction: 0.75 },
      events: [event(draws, happenedOn, 'cellFailed', note)],
    };
  }
  return calm;
}

/** About once a year in the owner's own season, some years left out; some owners also test a new bank. */
function drawDays(draws: Draws, start: string, years: number): string[] {
  const ages = draws.chance(0.25) ? [draws.uniform(0.12, 0.3)] : [];
  const season = draws.normalWithin(0, 0.12, -0.25, 0.25);
  for (let year = 1; year + season < years + 0.2; year++) {
    if (draws.chance(checkAttendance)) ages.push(Math.min(year + season + draws.normal(0, 0.04), years));
  }
  if (ages.length === 0) ages.push(Math.min(years, draws.uniform(0.5, 1)));
  return ages.map((age) => later(start, age));
}

function failingCourse(draws: Draws, all: string[], happenedOn: string): LifeCourse {
  const before = all.filter((day) => day < happenedOn);
  const kind = draws.weighted({ cellFailed: 0.62, swollen: 0.38 });
  const isMended = draws.chance(0.4);
  const note = kind === 'cellFailed' ? 'One cell no longer holds charge.' : 'Two cells have swollen.';
  const failed = event(draws, happenedOn, kind, note);
  const next = later(happenedOn, draws.uniform(0.03, 0.1));
  if (isMended && next < lastDay) {
    const mended = event(draws, next, 'cellReplaced', 'Replaced by a cell of the same type.');
    const after = all.filter((day) => day > next);
    const testedOn = before.length + after.length > 0 ? [...before, ...after] : [next];
    return { testedOn, events: [failed, mended], failure: null, driftPerYear: 0 };
  }
  const retiredOn = next < lastDay ? next : lastDay;
  const retired = event(draws, retiredOn, 'retired', 'Not worth mending.');
  const isTestedBroken = before.length === 0 || draws.chance(0.6);
  return {
    testedOn: isTestedBroken ? [...before, retiredOn] : before,
    events: [failed, retired],
    failure: { happenedOn, keptFraction: draws.uniform(0.62, 0.88) },
    driftPerYear: 0,
  };
}

function smallEvents(draws: Draws, testedOn: string[]): DemoEvent[] {
  if (testedOn.length < 2 || !draws.chance(0.05)) return [];
  const day = later(testedOn[draws.int(1, testedOn.length - 1)]!, -draws.uniform(0.1, 0.6));
  const happenedOn = day > testedOn[0]! ? day : testedOn[0]!;
  const kind = draws.weighted({ meterChanged: 0.4, bmsChanged: 0.4, layoutChanged: 0.2 });
  const notes = {
    meterChanged: 'New shunt.',
    bmsChanged: 'New BMS, counter carried over.',
    layoutChanged: 'Moved to the other wall, cabling renewed.',
  };
  return [event(draws, happenedOn, kind, notes[kind])];
}

function endEvent(draws: Draws, testedOn: string[], kind: 'sold' | 'retired'): DemoEvent {
  const day = later(testedOn[testedOn.length - 1]!, draws.uniform(0.05, 0.4));
  const note = kind === 'sold' ? 'Sold with the house.' : 'Made way for a larger bank.';
  return event(draws, day < lastDay ? day : lastDay, kind, note);
}

const event = (draws: Draws, happenedOn: string, kind: DemoEvent['kind'], note: string): DemoEvent => ({
  ...{ id: draws.uuid(), happenedOn, kind, note },
});

const dayMs = 86_400_000;

/** The day some years after another; the demo's last day at the latest where that lies in the past. */
export function later(day: string, years: number): string {
  const at = Date.parse(`${day}T00:00:00Z`) + Math.round(years * 365.2425) * dayMs;
  return new Date(at).toISOString().slice(0, 10);
}

/** Years between the last evening out (or first use) and a day. */
export function yearsSinceEven(course: LifeCourse, firstUseMonth: string, day: string): number {
  const evened = course.events.find(({ kind, happenedOn }) => kind === 'rebalanced' && happenedOn <= day);
  return Math.max(0, daysBetween(evened?.happenedOn ?? firstUseMonth, day) / 365.2425);
}
