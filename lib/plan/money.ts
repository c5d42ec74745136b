/** What one unit of money a year is worth today, paid at the end of each of n years: (1 - (1 + r)^-n) / r; n at r = 0. */
export function annuityFactor(rate: number, years: number): number {
  requireRate(rate);
  return rate === 0 ? years : (1 - discountFactor(rate, years)) / rate;
}

/** The yearly payment that repays one unit of money in n years, 1 / annuity factor. */
export function capitalRecoveryFactor(rate: number, years: number): number {
  return 1 / annuityFactor(rate, years);
}

/** What one unit of money after some years is worth today: (1 + r)^-t. */
export function discountFactor(rate: number, years: number): number {
  requireRate(rate);
  return (1 + rate) ** -years;
}

/** What happens by the end of a year (or of the part of a year a bank still lives). */
export interface YearFlow {
  /** Years from the start at which it is counted. */
  years: number;
  /** Money spent. */
  cost: number;
  /** Energy delivered to the loads, kWh. */
  deliveredKwh: number;
}

export interface LevelisedCost {
  discountedCost: number;
  discountedKwh: number;
  /** Money per kWh delivered; in the unit of the costs. */
  costPerKwh: number;
}

/**
 * Levelised cost of the energy delivered: (first cost + sum of costs / (1 + r)^t - residual / (1 + r)^N) divided by the
 * sum of energies / (1 + r)^t (Short, Packey and Holt, NREL/TP-462-5173, 1995, from memory).
 * @throws RangeError without any energy, or at a rate of -100 % and below
 */
export function levelisedCost(
  firstCost: number,
  flows: readonly YearFlow[],
  rate: number,
  residual = 0,
): LevelisedCost {
  let discountedCost = firstCost;
  let discountedKwh = 0;
  for (const { years, cost, deliveredKwh } of flows) {
    const factor = discountFactor(rate, years);
    discountedCost += cost * factor;
    discountedKwh += deliveredKwh * factor;
  }
  const last = flows.at(-1);
  if (last) discountedCost -= residual * discountFactor(rate, last.years);
  if (!(discountedKwh > 0)) throw new RangeError('levelisedCost requires energy above 0');
  return { discountedCost, discountedKwh, costPerKwh: discountedCost / discountedKwh };
}

/**
 * Years until the discounted gains have paid the first cost, interpolated within the year in which they do; null when
 * they never do.
 */
export function breakEvenYears(
  firstCost: number,
  gains: readonly { years: number; gain: number }[],
  rate: number,
): number | null {
  let balance = -firstCost;
  let before = 0;
  for (const { years, gain } of gains) {
    const step = gain * discountFactor(rate, years);
    if (balance + step >= 0 && step > 0) return before + (years - before) * (-balance / step);
    balance += step;
    before = years;
  }
  return null;
}

function requireRate(rate: number): void {
  if (!(rate > -1) || !Number.isFinite(rate)) throw new RangeError('a discount rate must be above -100 %');
}
