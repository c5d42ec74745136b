import type { Forecast } from '@/lib/contract/standing';
import {
  type BankPosterior,
  calendarShareAt,
  forecastOf,
  lifeAt,
  type PublishedFit,
  statusOf,
  type Use,
} from '@/lib/fit';

interface ForecastRequest {
  posterior: BankPosterior;
  use: Use;
  /** Years up to which this use is measured. */
  reach: number;
  cellType: string | undefined;
  /** Months as YYYY-MM and years since. */
  firstUseMonth: string;
  ageYears: number;
}

/** The year in which a bank comes down to 80 %, given its own checks, if it goes on as it was used to date. */
export function presentForecast(fit: PublishedFit, request: ForecastRequest): Forecast {
  const { posterior, use, reach, cellType, firstUseMonth, ageYears } = request;
  const { years, probabilityBy } = forecastOf(posterior, use);
  const inEfc = (value: number) => value * use.efcPerYear;
  const inYear = (value: number) => Math.floor(startOf(firstUseMonth) + value);
  return {
    years,
    efc: { estimate: inEfc(years.estimate), lower: inEfc(years.lower), upper: inEfc(years.upper) },
    inYear: {
      estimate: inYear(years.estimate),
      lower: inYear(years.lower),
      upper: statusOf(years.upper, reach) === 'beyond' ? null : inYear(years.upper),
    },
    status: statusOf(years.estimate, reach),
    support: lifeAt(fit, use, cellType === undefined ? {} : { cellType }).support,
    passedFraction: probabilityBy(Math.max(ageYears, 0.01)),
    calendarFraction: calendarShareAt(fit, use, years.estimate),
  };
}

/** The middle of a month, as a year with its fraction. */
function startOf(month: string): number {
  const [year, of] = month.split('-').map(Number);
  return year! + (of! - 0.5) / 12;
}
