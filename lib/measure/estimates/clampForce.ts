/**
 * Nut factor K of dry steel bolts as they come, in T = K F d. Source: Shigley's Mechanical Engineering Design, the
 * chapter on screws and fasteners (K about 0.2 where nothing is stated), from memory.
 */
export const usualNutFactor = 0.2;

/** How far a bolt's force by its torque may be off, as a share: same source, from memory. */
export const torqueOffFraction = 0.3;

/** The rods that press a row of cells, all tightened alike. */
export interface TightenedRods {
  /** Torque of each nut, N·m. */
  torqueNm: number;
  /** Nominal diameter of the thread, mm: 6 for M6. */
  threadMm: number;
  count: number;
  nutFactor?: number;
}

/**
 * Clamping force of tightened rods, N: F = n T / (K d). Friction takes most of the torque and varies, so that it is good
 * to about ± 30 %.
 * @throws RangeError unless torque, diameter, count and nut factor are above 0.
 */
export function clampForceOfTorque({
  torqueNm,
  threadMm,
  count,
  nutFactor = usualNutFactor,
}: TightenedRods): number {
  if (!(torqueNm > 0) || !(threadMm > 0) || !(count > 0) || !(nutFactor > 0))
    throw new RangeError('clampForceOfTorque requires a torque, a thread, a count and a nut factor above 0');
  return (count * torqueNm * 1000) / (nutFactor * threadMm);
}

/** The springs that press a row of cells side by side, all compressed alike. */
export interface CompressedSprings {
  /** Force per length of each, N/mm, from its data sheet. */
  rateNPerMm: number;
  /** How much shorter than when free, mm. */
  compressionMm: number;
  /** Springs side by side; springs end to end on one rod count as one of a smaller rate. */
  count: number;
}

/**
 * Clamping force of compressed springs, N, by Hooke's law: F = n k x.
 * @throws RangeError unless rate, compression and count are above 0.
 */
export function clampForceOfSprings({ rateNPerMm, compressionMm, count }: CompressedSprings): number {
  if (!(rateNPerMm > 0) || !(compressionMm > 0) || !(count > 0))
    throw new RangeError('clampForceOfSprings requires a rate, a compression and a count above 0');
  return count * rateNPerMm * compressionMm;
}
