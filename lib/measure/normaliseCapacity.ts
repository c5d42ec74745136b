import { defaultSettings } from './measureSettings';
import type { MeasureSettings } from './measureSettings';

/** A capacity at reference conditions, and how it came about. */
export interface NormalisedCapacity {
  capacityRefAh: number;
  /** capacityRefAh / measured capacity; 1 where no correction is made. */
  factor: number;
  /** Factors for temperature and for rate that the formula gives, within its range or not. */
  temperatureFactor: number;
  rateFactor: number;
  /** False outside the range of the formula: then the capacity stands as measured, and is to be flagged. */
  isCorrected: boolean;
  outside: ('temperature' | 'rate')[];
  /** Change of capacity per kelvin that was used. */
  perKelvin: number;
}

/**
 * Normalises a capacity to 25 °C cell temperature and 0.2 It:
 * Q_ref = Q / [1 + kT (T - 25)] x (I / 0.2)^(p - 1).
 * Valid for 15 to 35 °C and 0.05 to 0.5 It; outside no correction is made.
 * Reference conditions: IEC 62619, 62620. kT and p: judgement from common practice, no source.
 * @param capacityAh measured capacity, Ah
 * @param temperatureC mean cell temperature during the discharge, °C
 * @param meanIt mean rate during the discharge, It
 * @throws RangeError unless capacity and rate are above 0 and the temperature is a number.
 */
export function normaliseCapacity(
  capacityAh: number,
  temperatureC: number,
  meanIt: number,
  settings: MeasureSettings = defaultSettings,
): NormalisedCapacity {
  if (!(capacityAh > 0) || !(meanIt > 0) || !Number.isFinite(temperatureC)) {
    throw new RangeError('normaliseCapacity requires a capacity and a rate above 0, and a temperature');
  }
  const { validTemperatureC, validIt, referenceTemperatureC } = settings;
  const difference = temperatureC - referenceTemperatureC;
  const perKelvin = difference > 0 ? settings.perKelvinAbove : settings.perKelvinBelow;
  const temperatureFactor = 1 / (1 + perKelvin * difference);
  const rateFactor = (meanIt / settings.referenceIt) ** (settings.peukertExponent - 1);
  const outside: NormalisedCapacity['outside'] = [];
  if (temperatureC < validTemperatureC.min || temperatureC > validTemperatureC.max)
    outside.push('temperature');
  if (meanIt < validIt.min || meanIt > validIt.max) outside.push('rate');
  const isCorrected = outside.length === 0;
  const factor = isCorrected ? temperatureFactor * rateFactor : 1;
  return {
    capacityRefAh: capacityAh * factor,
    factor,
    temperatureFactor,
    rateFactor,
    isCorrected,
    outside,
    perKelvin,
  };
}
