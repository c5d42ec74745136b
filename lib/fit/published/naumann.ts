import { arrhenius } from './arrhenius';

const SECONDS_PER_YEAR = 365 * 86400;

/** One period of storage or use under constant conditions. */
export interface StoragePeriod {
  temperatureC: number;
  /** Mean state of charge, 0..1. */
  socFraction: number;
  years: number;
}

/**
 * Capacity lost by the calendar, fraction of rated, after `years` of 365 days under constant conditions.
 * Source: M. Naumann et al. 2018, J. Energy Storage 17, 153-169.
 */
export function naumannCalendarLoss({ temperatureC, socFraction, years }: StoragePeriod): number {
  return calendarRate(temperatureC, socFraction) * Math.sqrt(years);
}

/** The same over several periods: with a square-root law the squares of the losses add. */
export function naumannCalendarLossOver(periods: readonly StoragePeriod[]): number {
  return Math.sqrt(periods.reduce((sum, period) => sum + naumannCalendarLoss(period) ** 2, 0));
}

/** Years of 365 days until the calendar alone has taken `lossFraction`. Source as for naumannCalendarLoss. */
export function naumannYearsToLoss(temperatureC: number, socFraction: number, lossFraction: number): number {
  return (lossFraction / calendarRate(temperatureC, socFraction)) ** 2;
}

/**
 * Capacity lost by cycling alone, fraction of rated, after `efc` equivalent full cycles.
 * Source: M. Naumann, F. B. Spingler, A. Jossen 2020, J. Power Sources 451, 227666.
 */
export function naumannCycleLoss(cRateIt: number, depthFraction: number, efc: number): number {
  const rate = 0.063 * cRateIt + 0.0971;
  const depth = 4.0253 * (depthFraction - 0.6) ** 3 + 1.0923;
  return (rate * depth * Math.sqrt(efc)) / 100;
}

// Loss after one year.
function calendarRate(temperatureC: number, socFraction: number): number {
  const charge = 2.8575 * (socFraction - 0.5) ** 3 + 0.60225;
  return 1.2571e-5 * arrhenius(17126, temperatureC) * charge * Math.sqrt(SECONDS_PER_YEAR);
}
