/** Rated capacity (Ah) and nominal voltage (V) of a whole bank. */
export interface BankSize {
  ratedAh: number;
  nominalV: number;
}

/**
 * Share of a bank's energy that reaches the house through its inverter: common practice, no source. What is metered at
 * the bank itself needs none.
 */
export const usualInverterFraction = 0.92;

/**
 * Typical depth from the energy taken out in a night: depth = (energy / inverter's share) / (rated Ah x nominal V).
 * @param energyWh as metered, Wh
 * @param behindFraction share of the bank's energy that the meter sees: 1 at the bank, less behind an inverter
 * @returns the depth as a fraction; above 1 where more was taken out than the bank holds
 * @throws RangeError unless energy, bank size and share are above 0.
 */
export function depthFromEnergy(energyWh: number, bank: BankSize, behindFraction = 1): number {
  return energyWh / behindFraction / wattHoursOf('depthFromEnergy', energyWh, bank, behindFraction);
}

/**
 * Rate from a power: It = (power / inverter's share) / (rated Ah x nominal V), as 1 It is as many amperes as the rated
 * capacity has ampere-hours (IEC 61434).
 * @param powerW as metered, W
 * @param behindFraction share of the bank's power that the meter sees: 1 at the bank, less behind an inverter
 * @returns the rate, It
 * @throws RangeError unless power, bank size and share are above 0.
 */
export function rateFromPower(powerW: number, bank: BankSize, behindFraction = 1): number {
  return powerW / behindFraction / wattHoursOf('rateFromPower', powerW, bank, behindFraction);
}

function wattHoursOf(caller: string, amount: number, { ratedAh, nominalV }: BankSize, share: number): number {
  const isUsable = amount > 0 && ratedAh > 0 && nominalV > 0 && share > 0 && share <= 1;
  if (!isUsable)
    throw new RangeError(`${caller} requires an amount, a bank size and a share up to 1 above 0`);
  return ratedAh * nominalV;
}
