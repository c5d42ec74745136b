import { budgetOf, combineInQuadrature, rectangularSd } from './combineUncertainty';
import type { BudgetPart } from './combineUncertainty';
import { alongPoints } from './measureSettings';
import type { MeasureSettings } from './measureSettings';
import type { NormalisedCapacity } from './normaliseCapacity';

/** What the budget needs of a reading; names and units as where it is entered. */
export interface BudgetReading {
  method: 'countedDischarge' | 'countedCharge';
  /** Limit of the meter's own error, as its maker states it: 0.01 = ±1 %. */
  gainErrorFraction: number;
  /** Scatter of repeated readings, one standard deviation: 0.003 = 0.3 %. */
  readingNoiseFraction: number;
  fullChargeEndedBy: 'voltageAndTail' | 'bms' | 'time';
  lowestCellAtFullV: number | null;
  highestCellAtFullV: number;
  lowestCellAtEndV: number;
  highestCellAtEndV: number | null;
}

/** Both halves of a budget; `relSd` are combined relative standard uncertainties. */
export interface UncertaintyBudget {
  relSdMeter: number;
  relSdNew: number;
  sameEachCheck: BudgetPart[];
  newEachCheck: BudgetPart[];
}

/** The parts in words, for whoever shows a budget. */
export const budgetPartLabels: Record<string, string> = {
  gain: "the meter's own error",
  reading: 'reading',
  temperature: 'temperature',
  rate: 'rate',
  notCorrected: 'conditions out of range',
  cutOff: 'cut-off',
  fullCharge: 'full charge',
  imbalance: 'imbalance',
  logGaps: 'gaps in the log',
  countedCharge: 'counted while charging',
};

/**
 * The uncertainty budget of a capacity at reference conditions (quadrature, JCGM 100:2008), in two halves: what is the
 * same at each check of this meter, and what is new at each check. Only the second may feed a fit over several checks.
 * @param series cells in series; a single one cannot be out of balance
 * @param gapRelSd relative standard uncertainty from gaps in the log, 0 without a log
 */
export function uncertaintyBudget(
  reading: BudgetReading,
  normalised: NormalisedCapacity,
  conditions: { temperatureC: number; meanIt: number; series: number; gapRelSd: number },
  settings: MeasureSettings,
): UncertaintyBudget {
  const same = [{ name: 'gain', relSd: rectangularSd(reading.gainErrorFraction) }];
  const fresh = [
    { name: 'reading', relSd: reading.readingNoiseFraction },
    ...correctionParts(normalised, conditions, settings),
    { name: 'cutOff', relSd: cutOffSd(reading.lowestCellAtEndV, settings) },
    { name: 'fullCharge', relSd: fullChargeSd(reading, settings) },
    { name: 'imbalance', relSd: conditions.series > 1 ? imbalanceSd(reading, settings) : 0 },
    { name: 'logGaps', relSd: conditions.gapRelSd },
    { name: 'countedCharge', relSd: reading.method === 'countedCharge' ? settings.countedChargeRelSd : 0 },
  ];
  return {
    relSdMeter: combineInQuadrature(same.map(({ relSd }) => relSd)),
    relSdNew: combineInQuadrature(fresh.map(({ relSd }) => relSd)),
    sameEachCheck: budgetOf(same),
    newEachCheck: budgetOf(fresh),
  };
}

/**
 * Sensitivities of Q_ref, relative: to kT -(T - 25) / [1 + kT (T - 25)], to T -kT / [1 + kT (T - 25)], to p ln(I / 0.2).
 * Where no correction was made the whole correction that the formula would give may be missing, or more.
 */
const correctionParts = (
  { isCorrected, perKelvin, temperatureFactor, rateFactor }: NormalisedCapacity,
  { temperatureC, meanIt }: { temperatureC: number; meanIt: number },
  settings: MeasureSettings,
) => {
  if (!isCorrected) {
    return [{ name: 'notCorrected', relSd: combineInQuadrature([temperatureFactor - 1, rateFactor - 1]) }];
  }
  const difference = temperatureC - settings.referenceTemperatureC;
  const fromCoefficient = temperatureFactor * difference * settings.temperatureRelSd * perKelvin;
  const fromSensor = temperatureFactor * perKelvin * settings.cellTemperatureSd;
  return [
    { name: 'temperature', relSd: combineInQuadrature([fromCoefficient, fromSensor]) },
    { name: 'rate', relSd: Math.abs(Math.log(meanIt / settings.referenceIt)) * settings.peukertSd },
  ];
};

/** Charge left above (or taken out below) the cut-off is known to about its own size; the voltage read, to 0.03 V. */
const cutOffSd = (
  lowestCellAtEndV: number,
  { cutOffCellV, leftAtEnd, cellVoltageSd }: MeasureSettings,
): number => {
  const left = alongPoints(leftAtEnd, lowestCellAtEndV) - alongPoints(leftAtEnd, cutOffCellV);
  const beside = [lowestCellAtEndV - cellVoltageSd, lowestCellAtEndV + cellVoltageSd];
  const [below = 0, above = 0] = beside.map((volts) => alongPoints(leftAtEnd, volts));
  return combineInQuadrature([rectangularSd(left), (above - below) / 2]);
};

/** How the charge was ended, and what the fullest cell still lacked. */
const fullChargeSd = (reading: BudgetReading, settings: MeasureSettings): number =>
  combineInQuadrature([
    settings.fullChargeRelSd[reading.fullChargeEndedBy],
    rectangularSd(alongPoints(settings.missingAtFull, reading.highestCellAtFullV)),
  ]);

/**
 * Out of balance, the bank ends with its lowest cell while others hold charge, and stops charging at its highest while
 * others lack some. Half of the difference at the end is taken for cells of less capacity, which is no imbalance.
 */
const imbalanceSd = (reading: BudgetReading, settings: MeasureSettings): number => {
  const { lowestCellAtFullV, highestCellAtFullV, lowestCellAtEndV, highestCellAtEndV } = reading;
  const lacking = (volts: number) => alongPoints(settings.missingAtFull, volts);
  const left = (volts: number) => alongPoints(settings.leftAtEnd, volts);
  const atFull =
    lowestCellAtFullV === null
      ? settings.unknownImbalanceRelSd
      : rectangularSd(lacking(lowestCellAtFullV) - lacking(highestCellAtFullV));
  const atEnd =
    highestCellAtEndV === null
      ? settings.unknownImbalanceRelSd
      : rectangularSd((left(highestCellAtEndV) - left(lowestCellAtEndV)) / 2);
  return combineInQuadrature([atFull, atEnd]);
};
