/** Five bands of climate, by the mean of the year outdoors. */
export type ClimateBand = 'cold' | 'cool' | 'mild' | 'warm' | 'hot';
/** Where a bank stands. */
export type Standing = 'indoors' | 'shed' | 'garage' | 'vehicle' | 'boat';

/** Mean of the year outdoors that each band holds, °C; open at both ends. */
export const climateBandsC: Record<ClimateBand, { from: number | null; below: number | null }> = {
  cold: { from: null, below: 12 },
  cool: { from: 12, below: 16 },
  mild: { from: 16, below: 20 },
  warm: { from: 20, below: 25 },
  hot: { from: 25, below: null },
};

/**
 * Mean cell temperature over the year by band and place, °C: common practice, no source. Cells stand about 4 K above
 * the outdoor mean, by their own heat and by shelter and sun; a room that is heated or cooled lies nearer to 20 °C; water
 * keeps a boat a little cooler.
 */
const usualC: Record<ClimateBand, Record<Standing, number>> = {
  cold: { indoors: 17, shed: 14, garage: 14.5, vehicle: 15, boat: 13.5 },
  cool: { indoors: 19.5, shed: 17.5, garage: 18, vehicle: 18.5, boat: 17 },
  mild: { indoors: 23, shed: 21.5, garage: 22, vehicle: 22.5, boat: 21 },
  warm: { indoors: 27, shed: 26, garage: 26.5, vehicle: 27, boat: 25.5 },
  hot: { indoors: 32, shed: 32, garage: 32.5, vehicle: 33, boat: 31.5 },
};

/** How far such an estimate may be off, K: common practice, no source. */
export const usualTemperatureOffK = 4;

/** Mean cell temperature over the year to be expected of a bank, °C, by a table of common practice. */
export function usualCellTemperatureC(band: ClimateBand, standing: Standing): number {
  return usualC[band][standing];
}
