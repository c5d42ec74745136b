import { cRateIt, daysBetween, yearsBetween } from '@/lib/units';

import { coverageFactor } from './combineUncertainty';
import { equivalentCycles } from './equivalentCycles';
import type { CycleSources } from './equivalentCycles';
import { defaultSettings } from './measureSettings';
import type { MeasureSettings } from './measureSettings';
import { normaliseCapacity } from './normaliseCapacity';
import { uncertaintyBudget } from './uncertaintyBudget';
import type { BudgetReading, UncertaintyBudget } from './uncertaintyBudget';

/** What the meter and the cells showed in a test, of the whole bank. */
export interface ReadingValues extends BudgetReading {
  /** YYYY-MM-DD */
  testedOn: string;
  capacityAh: number;
  energyWh: number;
  meanCurrentA: number;
  temperatureStartC: number;
  temperatureEndC: number;
}

/** The bank that was tested. */
export interface TestedBank {
  parallel: number;
  series: number;
  /** Rated capacity of one cell, Ah. */
  ratedAhCell: number;
  /** Nominal voltage of one cell, V. */
  nominalV: number;
  /** YYYY-MM */
  firstUseMonth: string;
}

/** What calculation 2 takes from a log, where there is one. */
export interface LogFigures {
  meanTemperatureC: number | null;
  gapChargeFraction: number;
  gapRelSd?: number | null;
}

/** Capacity at reference conditions with its uncertainty, of the whole bank. */
export interface NormalisedCheck {
  capacityRefAh: number;
  /** Capacity at reference conditions / rated capacity. */
  sohFraction: number;
  /** False where the test lies outside 15-35 °C or 0.05-0.5 It: the capacity then stands as measured. */
  isCorrected: boolean;
  outside: ('temperature' | 'rate')[];
  temperatureFactor: number;
  rateFactor: number;
  meanIt: number;
  meanTemperatureC: number;
  meanCellV: number;
  relSdMeter: number;
  relSdNew: number;
  /** ± at 95 % (k = 2) of what is new at each check, Ah. */
  expandedAh: number;
  /** ± at 95 % (k = 2) of the meter's own error, Ah: the same at each of its checks. */
  expandedMeterAh: number;
  budget: Pick<UncertaintyBudget, 'sameEachCheck' | 'newEachCheck'>;
}

/** Calculations 2 and 3 of a check. */
export interface ComputedCheck extends NormalisedCheck {
  ageYears: number;
  efc: number;
  efcFromCounter: number | null;
  efcFromDepth: number | null;
  efcDisagreement: number | null;
}

/**
 * Calculation 2: a reading at 25 °C and 0.2 It with its uncertainty budget. Pure; forms and server both call it.
 * @throws RangeError unless capacity, current and rated capacity are above 0.
 */
export function normaliseCheck(
  reading: ReadingValues,
  bank: Pick<TestedBank, 'parallel' | 'series' | 'ratedAhCell'>,
  log: LogFigures | null = null,
  settings: MeasureSettings = defaultSettings,
): NormalisedCheck {
  const ratedAh = bank.ratedAhCell * bank.parallel;
  const meanIt = cRateIt(reading.meanCurrentA, ratedAh);
  const temperatureC = log?.meanTemperatureC ?? (reading.temperatureStartC + reading.temperatureEndC) / 2;
  const normalised = normaliseCapacity(reading.capacityAh, temperatureC, meanIt, settings);
  const conditions = { temperatureC, meanIt, series: bank.series, gapRelSd: gapRelSdOf(log) };
  const { relSdMeter, relSdNew, ...budget } = uncertaintyBudget(reading, normalised, conditions, settings);
  const { capacityRefAh, isCorrected, outside, temperatureFactor, rateFactor } = normalised;
  return {
    capacityRefAh,
    sohFraction: capacityRefAh / ratedAh,
    isCorrected,
    outside,
    temperatureFactor,
    rateFactor,
    meanIt,
    meanTemperatureC: temperatureC,
    meanCellV: reading.energyWh / reading.capacityAh / bank.series,
    relSdMeter,
    relSdNew,
    expandedAh: coverageFactor * relSdNew * capacityRefAh,
    expandedMeterAh: coverageFactor * relSdMeter * capacityRefAh,
    budget,
  };
}

/** A log stored without its own figure for gaps: a tenth of what they hold, as a limit. */
const gapRelSdOf = (log: LogFigures | null): number => {
  if (!log) return 0;
  return log.gapRelSd ?? (0.1 * log.gapChargeFraction) / Math.sqrt(3);
};

/**
 * Calculations 2 and 3 of a check: capacity at reference conditions with its budget, age, and equivalent full cycles.
 * @param check reading and conditions since the previous check, as entered
 * @param previous the check before, whose cycles the depth adds to; null for a first one
 * @throws RangeError unless capacity, current and rated capacity are above 0 and one source of cycles is there.
 */
export function computeCheck(
  check: { reading: ReadingValues; conditions: CycleSources },
  bank: TestedBank,
  log: LogFigures | null,
  previous: { testedOn: string; efc: number } | null,
  settings: MeasureSettings = defaultSettings,
): ComputedCheck {
  const { reading, conditions } = check;
  const since = {
    days: Math.max(0, daysBetween(previous?.testedOn ?? bank.firstUseMonth, reading.testedOn)),
    efc: previous?.efc ?? 0,
  };
  const whole = { ratedAh: bank.ratedAhCell * bank.parallel, nominalV: bank.nominalV * bank.series };
  const { efc, efcFromCounter, efcFromDepth, efcDisagreement } = equivalentCycles(conditions, whole, since);
  return {
    ...normaliseCheck(reading, bank, log, settings),
    ageYears: Math.max(0, yearsBetween(bank.firstUseMonth, reading.testedOn)),
    efc,
    efcFromCounter,
    efcFromDepth,
    efcDisagreement,
  };
}
