import { yearsBetween } from '@/lib/units';

import { drawPeriod, livedThrough, type Period } from './bankUse';
import type { LifeCourse } from './lifeCourse';
import { held } from './random';
import { trueSoh } from './truth';
import type { BankTruth, TrueState } from './types';

/** Where a bank's history is drawn from. */
export interface HistoryPlace {
  seed: number;
  bank: number;
  firstUseMonth: string;
  isClamped: boolean;
}

/** The true state of a bank at each of its checks. */
export function liveThrough(place: HistoryPlace, truth: BankTruth, course: LifeCourse): TrueState[] {
  const { priorYears, use } = truth;
  const periods: Period[] = priorYears > 0 ? [{ ...use, years: priorYears }] : [];
  const priorEfc = priorYears * use.efcPerYear;
  let since = 0;
  return course.testedOn.map((day, index) => {
    const years = Math.max(yearsBetween(place.firstUseMonth, day), 1 / 24);
    const period = drawPeriod(use, Math.max(years - since, 1 / 365), place.seed, place.bank, index);
    periods.push(period);
    since = years;
    const countedEfc = efcOf(periods) - priorEfc;
    const [ageYears, efc] = [years + priorYears, countedEfc + priorEfc];
    const lived = livedThrough(periods, place.isClamped);
    const { failure } = course;
    const kept = failure && day >= failure.happenedOn ? failure.keptFraction : 1;
    const { depthFraction, dischargeIt, temperatureC, socMeanFraction, efcPerYear } = period;
    return {
      ...{ ageYears, efc, countedEfc },
      sohFraction: held(kept * trueSoh(lived, ageYears, efc, truth), 0.05, 1.2),
      since: { depthFraction, dischargeIt, temperatureC, socMeanFraction, efcPerYear },
    };
  });
}

const efcOf = (periods: readonly Period[]) =>
  periods.reduce((sum, { years, efcPerYear }) => sum + years * efcPerYear, 0);
