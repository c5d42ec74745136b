import { annuityFactor } from './money';

/** A clamping fixture beside the life it would have to add. */
export interface FixtureWorth {
  /** Life with the fixture / life without at which both cost the same a year. */
  breakEvenRatio: number;
  /** The same in years on top of the life without. */
  breakEvenAddedYears: number;
}

/**
 * How much longer a bank must live to pay for a fixture: the bank and the bank with fixture, each repaid evenly over
 * its own life, cost the same a year, (B + F) / a(r, T') = B / a(r, T). Solved in closed form; null when no life is long
 * enough.
 * @param bankMinor what is bought anew when the bank ends (cells and what goes with them)
 */
export function fixtureBreakEven({
  bankMinor,
  fixtureMinor,
  lifeYears,
  discountRate,
}: {
  bankMinor: number;
  fixtureMinor: number;
  lifeYears: number;
  discountRate: number;
}): FixtureWorth | null {
  if (!(bankMinor > 0) || !(fixtureMinor >= 0) || !(lifeYears > 0))
    throw new RangeError('fixtureBreakEven requires a bank with a price, a fixture and a life');
  const wanted = (annuityFactor(discountRate, lifeYears) * (bankMinor + fixtureMinor)) / bankMinor;
  const needed =
    discountRate === 0 ? wanted : -Math.log(1 - discountRate * wanted) / Math.log(1 + discountRate);
  if (!Number.isFinite(needed) || needed <= 0) return null;
  return { breakEvenRatio: needed / lifeYears, breakEvenAddedYears: needed - lifeYears };
}
