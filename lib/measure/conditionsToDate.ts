/** Ideal gas constant, kJ/(mol K), and the activation energy for the mean temperature: 25 kJ/mol (judgement). */
const gasConstant = 8.314e-3;
const activationEnergy = 25;
const kelvin = 273.15;

/** Conditions of one period between two checks. */
export interface PeriodConditions {
  days: number;
  /** Equivalent full cycles in the period. */
  efc: number;
  depthFraction: number;
  dischargeIt: number;
  temperatureC: number;
  socMeanFraction: number;
  isClamped: boolean;
}

/** Conditions from first use to a check. */
export type ConditionsToDate = Omit<PeriodConditions, 'days' | 'efc'>;

/**
 * Mean state of charge of a period, 0..1: as given, or the middle of the daily window, with idle days at theirs.
 * @returns undefined when neither is given.
 */
export function socMeanOf(
  conditions: {
    socMeanFraction: number | null;
    socLowFraction: number | null;
    socHighFraction: number | null;
    idleDays: number | null;
    idleSocFraction: number | null;
  },
  days: number,
): number | undefined {
  const { socMeanFraction, socLowFraction, socHighFraction, idleDays, idleSocFraction } = conditions;
  // A mean that was typed is of the whole period already.
  if (socMeanFraction !== null) return socMeanFraction;
  if (socLowFraction === null || socHighFraction === null) return undefined;
  const middle = (socLowFraction + socHighFraction) / 2;
  if (idleSocFraction === null || !idleDays || !(days > 0)) return middle;
  const idleShare = Math.min(1, idleDays / days);
  return middle * (1 - idleShare) + idleSocFraction * idleShare;
}

/**
 * Brings the periods since new together: temperature as the Arrhenius-weighted mean over time (25 kJ/mol), state of
 * charge over time, depth and rate over full cycles, clamped if more than half of the full cycles were.
 * @throws RangeError without a period of more than 0 days.
 */
export function conditionsToDate(periods: PeriodConditions[]): ConditionsToDate {
  const days = periods.reduce((sum, period) => sum + period.days, 0);
  if (!(days > 0)) throw new RangeError('conditionsToDate requires periods of more than 0 days');
  const efc = periods.reduce((sum, period) => sum + Math.max(0, period.efc), 0);
  // A bank that was never cycled still has a typical depth: then time weighs.
  const mean = (value: (period: PeriodConditions) => number, isOverCycles: boolean) =>
    periods.reduce((sum, period) => {
      const weight = isOverCycles && efc > 0 ? Math.max(0, period.efc) / efc : period.days / days;
      return sum + weight * value(period);
    }, 0);
  const speed = (temperatureC: number) =>
    Math.exp(-activationEnergy / (gasConstant * (temperatureC + kelvin)));
  const meanSpeed = mean((period) => speed(period.temperatureC), false);
  return {
    depthFraction: mean((period) => period.depthFraction, true),
    dischargeIt: mean((period) => period.dischargeIt, true),
    temperatureC: -activationEnergy / (gasConstant * Math.log(meanSpeed)) - kelvin,
    socMeanFraction: mean((period) => period.socMeanFraction, false),
    isClamped: mean((period) => (period.isClamped ? 1 : 0), true) > 0.5,
  };
}
