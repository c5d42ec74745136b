import type { CheckFields, Computed } from '@/lib/contract/checks';
import type { LogResult } from '@/lib/contract/uploads';
import type { ScreenBank, ScreenContext, ScreenPrevious } from '@/server/moderation/screenTypes';

/** An honest 2p16s bank of 230 Ah cells, three years old, tested at 25 °C and 0.2 It: 460 Ah rated, 437 Ah measured. */
const bank: ScreenBank = {
  parallel: 2,
  series: 16,
  ratedAhCell: 230,
  nominalV: 3.2,
  firstUseMonth: '2023-11',
  events: [],
};

const reading: CheckFields['reading'] = {
  testedOn: '2026-11-02',
  method: 'countedDischarge',
  instrument: 'shunt',
  gainErrorFraction: 0.005,
  readingNoiseFraction: 0.001,
  capacityAh: 437,
  energyWh: 437 * 16 * 3.2,
  meanCurrentA: 92,
  durationS: (437 / 92) * 3600,
  temperatureStartC: 24,
  temperatureEndC: 26,
  fullChargeEndedBy: 'voltageAndTail',
  restMinutes: 30,
  dischargeEndedBy: 'lowestCell',
  endedByCell: '7',
  lowestCellAtFullV: 3.46,
  highestCellAtFullV: 3.5,
  lowestCellAtEndV: 2.8,
  highestCellAtEndV: 2.95,
};

const conditions: CheckFields['conditions'] = {
  depthFraction: 0.6,
  dischargeIt: 0.1,
  chargeIt: 0.15,
  peakIt: null,
  temperatureMeanC: 22,
  temperatureHottestC: null,
  temperatureColdestC: null,
  temperatureOf: 'cells',
  coldestChargingC: null,
  socMeanFraction: 0.5,
  socLowFraction: null,
  socHighFraction: null,
  counterKind: 'efc',
  counterValue: 600,
  cyclesPerDay: 1,
  idleDays: null,
  idleSocFraction: null,
};

export interface ContextChanges {
  bank?: Partial<ScreenBank>;
  reading?: Partial<CheckFields['reading']>;
  conditions?: Partial<CheckFields['conditions']>;
  computed?: Partial<Computed>;
  log?: Partial<LogResult>;
  previousChecks?: ScreenPrevious[];
  sameLogCheckIds?: string[];
}

/** The honest submission with some of its values changed; what is computed follows the values. */
export function screenContext(changes: ContextChanges = {}): ScreenContext {
  const changedBank = { ...bank, ...changes.bank };
  const fields = fieldsOf(changes);
  return {
    bank: changedBank,
    fields,
    computed: { ...compute(changedBank, fields), ...changes.computed },
    log: changes.log ? { ...log, ...changes.log } : null,
    previousChecks: changes.previousChecks ?? [],
    sameLogCheckIds: changes.sameLogCheckIds ?? [],
  };
}

/** An earlier check of the honest bank, approved, of 2 Nov 2025: 446 Ah and 400 full cycles. */
export function earlierCheck(
  changes: ContextChanges & Partial<Pick<ScreenPrevious, 'state'>> = {},
): ScreenPrevious {
  const capacityAh = changes.reading?.capacityAh ?? 446;
  const fields = fieldsOf({
    reading: { testedOn: '2025-11-02', capacityAh, energyWh: capacityAh * 16 * 3.2, ...changes.reading },
    conditions: { counterValue: 400, ...changes.conditions },
  });
  return {
    checkId: '6f9619ff-8b86-4011-b42d-00c04fc964ff',
    testedOn: fields.reading.testedOn,
    state: changes.state ?? 'approved',
    fields,
    computed: { ...compute(bank, fields), ...changes.computed },
  };
}

function fieldsOf(changes: ContextChanges): CheckFields {
  return {
    reading: { ...reading, ...changes.reading },
    conditions: { ...conditions, ...changes.conditions },
    uploadId: null,
    photoId: null,
    sources: {},
    note: '',
  };
}

function compute(of: ScreenBank, { reading: read, conditions: lived }: CheckFields): Computed {
  const ratedAh = of.ratedAhCell * of.parallel;
  return {
    ageYears: 3,
    capacityRefAh: read.capacityAh,
    sohFraction: read.capacityAh / ratedAh,
    isCorrected: true,
    meanIt: read.meanCurrentA / ratedAh,
    meanTemperatureC: (read.temperatureStartC + read.temperatureEndC) / 2,
    meanCellV: read.energyWh / read.capacityAh / of.series,
    relSdMeter: 0.003,
    relSdNew: 0.008,
    expandedAh: 2 * Math.hypot(0.003, 0.008) * read.capacityAh,
    budget: { sameEachCheck: [], newEachCheck: [] },
    efc: lived.counterValue ?? 0,
    efcFromCounter: lived.counterValue,
    efcFromDepth: null,
    efcDisagreement: null,
  };
}

const log: LogResult = {
  capacityAh: 437,
  energyWh: null,
  meanCurrentA: 92,
  meanTemperatureC: 25,
  startTemperatureC: 24,
  endTemperatureC: 26,
  startVoltageV: null,
  endVoltageV: null,
  lowestCellAtEndV: null,
  highestCellAtEndV: null,
  lowestCellAtFullV: null,
  highestCellAtFullV: null,
  durationS: 17_100,
  windowStartS: 0,
  windowEndS: 17_100,
  firstStamp: null,
  rowsRead: 1000,
  rowsUsed: 1000,
  rowsSkipped: 0,
  legs: 1,
  gapChargeFraction: 0,
  warnings: [],
  series: { timeS: [], voltageV: [], currentA: [], temperatureC: [] },
};
