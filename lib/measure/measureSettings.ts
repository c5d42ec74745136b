/**
 * Every number of calculation 2 that is judgement. They are set from common practice, with no source, and are an
 * argument wherever they are used, so that a reader who knows better can put in their own.
 */
export interface MeasureSettings {
  /** Reference conditions: IEC 62619 and 62620 (0.2 It, 25 °C). */
  referenceTemperatureC: number;
  referenceIt: number;
  /** Change of capacity per kelvin below and above 25 °C; the standard uncertainty is `temperatureRelSd` of it. */
  perKelvinBelow: number;
  perKelvinAbove: number;
  temperatureRelSd: number;
  /** Peukert exponent and its standard uncertainty. */
  peukertExponent: number;
  peukertSd: number;
  /** Outside these no correction is made. */
  validTemperatureC: { min: number; max: number };
  validIt: { min: number; max: number };
  /** Standard uncertainty of the mean cell temperature, K: a few sensors stand for all cells. */
  cellTemperatureSd: number;
  /** The voltage of the lowest cell, under load, at which a test is to end. */
  cutOffCellV: number;
  /** Standard uncertainty of a cell voltage read at the end, V: it falls while it is read. */
  cellVoltageSd: number;
  /** Charge left at the end, as a share of the capacity, by the lowest cell's voltage under load (points of a line). */
  leftAtEnd: readonly (readonly [volts: number, fraction: number])[];
  /** Charge missing at full, as a share, by a cell's voltage at the end of charging (points of a line). */
  missingAtFull: readonly (readonly [volts: number, fraction: number])[];
  /** Standard uncertainty, relative, of how full a charge ended this way leaves the bank. */
  fullChargeRelSd: { voltageAndTail: number; bms: number; time: number };
  /** Standard uncertainty, relative, for imbalance when the spread of the cells is not known. */
  unknownImbalanceRelSd: number;
  /** Standard uncertainty, relative, of taking charge put in for charge that can be taken out. */
  countedChargeRelSd: number;
}

/** Common practice, no source; see each field of `MeasureSettings`. */
export const defaultSettings: MeasureSettings = {
  referenceTemperatureC: 25,
  referenceIt: 0.2,
  perKelvinBelow: 0.004,
  perKelvinAbove: 0.001,
  temperatureRelSd: 0.5,
  peukertExponent: 1.01,
  peukertSd: 0.01,
  validTemperatureC: { min: 15, max: 35 },
  validIt: { min: 0.05, max: 0.5 },
  cellTemperatureSd: 1,
  cutOffCellV: 2.8,
  cellVoltageSd: 0.03,
  leftAtEnd: [
    [2.5, 0],
    [2.8, 0.012],
    [3.0, 0.03],
    [3.1, 0.07],
    [3.2, 0.25],
    [3.3, 0.6],
  ],
  missingAtFull: [
    [3.3, 0.4],
    [3.35, 0.08],
    [3.4, 0.02],
    [3.45, 0.006],
    [3.55, 0.002],
    [3.65, 0],
  ],
  fullChargeRelSd: { voltageAndTail: 0.003, bms: 0.006, time: 0.015 },
  unknownImbalanceRelSd: 0.004,
  countedChargeRelSd: 0.005,
};

/** Reads a line given by points, level beyond its ends. */
export function alongPoints(points: MeasureSettings['leftAtEnd'], volts: number): number {
  const upper = points.findIndex(([at]) => at >= volts);
  const [first, last] = [points[0], points.at(-1)];
  if (upper < 0) return last?.[1] ?? 0;
  const [low, high] = [points[upper - 1], points[upper]];
  if (!low || !high) return first?.[1] ?? 0;
  return low[1] + ((high[1] - low[1]) * (volts - low[0])) / (high[0] - low[0]);
}
