import { kelvin } from './arrhenius';

/**
 * Capacity lost by the calendar, fraction, after `months`: an exponent of 0.8 where others have 0.5.
 * Source: D.-I. Stroe et al. 2016, IEEE Trans. Ind. Appl. 52, 5009-5018.
 */
export function stroeCalendarLoss(temperatureC: number, socFraction: number, months: number): number {
  const heat = 1.9775e-11 * Math.exp(0.07511 * kelvin(temperatureC));
  const charge = 1.639 * Math.exp(0.007388 * 100 * socFraction);
  return (heat * charge * months ** 0.8) / 100;
}
