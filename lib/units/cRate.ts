/**
 * Rate of a current, in It. It (A) = rated capacity (Ah) / 1 h.
 * @throws RangeError unless the rated capacity is above 0 Ah.
 * Source: IEC 61434:1996.
 */
export function cRateIt(currentA: number, ratedAh: number): number {
  if (!(ratedAh > 0)) throw new RangeError('cRateIt requires a rated capacity above 0 Ah');
  return currentA / ratedAh;
}

/**
 * Current in A of a rate given in It, for a rated capacity in Ah.
 * @throws RangeError unless the rated capacity is above 0 Ah.
 * Source: IEC 61434:1996.
 */
export function currentOfIt(rateIt: number, ratedAh: number): number {
  if (!(ratedAh > 0)) throw new RangeError('currentOfIt requires a rated capacity above 0 Ah');
  return rateIt * ratedAh;
}
