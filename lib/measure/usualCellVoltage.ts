/**
 * Mean voltage of an LFP cell over a full discharge or charge at home rates, V: common practice, no source. A mean
 * outside is no LFP bank of that many cells in series, or charge and energy of different things.
 */
export const usualMeanCellV = {
  countedDischarge: { min: 3.0, max: 3.35 },
  countedCharge: { min: 3.2, max: 3.5 },
} as const;
