import { GAS_CONSTANT, kelvin } from './arrhenius';

/** Discharge rates of the study, with its pre-exponential factor at each. */
const FACTOR_AT_IT = { 0.5: 31630, 2: 21681, 6: 12934, 10: 15512 } as const;
const EXPONENT = 0.55;

export type WangRate = keyof typeof FACTOR_AT_IT;

/**
 * Capacity lost by cycling, fraction of the start: B(C) exp((-31700 + 370.3 C)/(R T)) Ah^0.55 %.
 * `throughputAh` is of the study's 2.2 Ah cell; only the four rates of the study are defined.
 * Source: J. Wang et al. 2011, J. Power Sources 196, 3942-3948.
 */
export function wangCycleLoss(dischargeIt: WangRate, temperatureC: number, throughputAh: number): number {
  return (ratePercent(dischargeIt, temperatureC) * throughputAh ** EXPONENT) / 100;
}

/** Throughput of the 2.2 Ah cell, Ah, at which `lossFraction` is lost. Source as for wangCycleLoss. */
export function wangThroughputToLoss(
  dischargeIt: WangRate,
  temperatureC: number,
  lossFraction: number,
): number {
  return ((100 * lossFraction) / ratePercent(dischargeIt, temperatureC)) ** (1 / EXPONENT);
}

function ratePercent(dischargeIt: WangRate, temperatureC: number): number {
  const exponent = (-31700 + 370.3 * dischargeIt) / (GAS_CONSTANT * kelvin(temperatureC));
  return FACTOR_AT_IT[dischargeIt] * Math.exp(exponent);
}
