import type { Bank } from '@/lib/contract/banks';
import type { Check, CheckFields } from '@/lib/contract/checks';
import { computeCase } from '@/components/checks/computedCase';

/** A bank of 1 x 16 invented cells of 240 Ah. */
export function sampleBank(overrides: Partial<Bank> = {}): Bank {
  return {
    id: '5f0a1f7e-52a5-4a5e-9a53-0d3c3a4b8e01',
    version: 1,
    name: 'Shed bank',
    cellTypeId: 'gannet-240',
    cellType: { id: 'gannet-240', maker: 'Gannet', name: 'Gannet 240', ratedAh: 240, nominalV: 3.2 },
    parallel: 1,
    series: 16,
    ratedAh: 240,
    firstUseMonth: '2023-03',
    madeMonth: null,
    bought: 'new',
    startCapacityAh: null,
    clamping: 'none',
    clampForceN: null,
    clampTorqueNm: null,
    spacingMm: null,
    place: null,
    climateBand: null,
    chargeLimitV: null,
    dischargeLimitV: null,
    bmsHighTripV: null,
    bmsLowTripV: null,
    priceMinor: null,
    priceCurrency: null,
    priceMonth: null,
    sources: {},
    checkCount: 0,
    events: [],
    ...overrides,
  };
}

/** Readings and conditions that nothing is wrong with. */
export function sampleFields(): CheckFields {
  return {
    reading: {
      testedOn: '2026-11-02',
      method: 'countedDischarge',
      instrument: 'Shunt of 300 A',
      gainErrorFraction: 0.005,
      readingNoiseFraction: 0.002,
      capacityAh: 226.4,
      energyWh: 11570,
      meanCurrentA: 48,
      durationS: 16_980,
      temperatureStartC: 21,
      temperatureEndC: 23,
      fullChargeEndedBy: 'voltageAndTail',
      restMinutes: 60,
      dischargeEndedBy: 'lowestCell',
      endedByCell: null,
      lowestCellAtFullV: 3.45,
      highestCellAtFullV: 3.47,
      lowestCellAtEndV: 2.8,
      highestCellAtEndV: 2.95,
    },
    conditions: {
      depthFraction: 0.6,
      dischargeIt: 0.1,
      chargeIt: 0.2,
      peakIt: null,
      temperatureMeanC: 19,
      temperatureHottestC: 28,
      temperatureColdestC: 9,
      temperatureOf: 'cells',
      coldestChargingC: null,
      socMeanFraction: 0.55,
      socLowFraction: null,
      socHighFraction: null,
      counterKind: 'ah',
      counterValue: 172_800,
      cyclesPerDay: 0.9,
      idleDays: 14,
      idleSocFraction: 0.5,
    },
    uploadId: null,
    photoId: null,
    sources: { capacityAh: 'metered', temperatureMeanC: 'readOff' },
    note: '',
  };
}

/** A stored check of the sample bank, its figures computed from its fields. */
export function sampleCheck(overrides: Partial<Check> = {}): Check {
  const fields = { ...sampleFields(), ...overrides };
  const { computed } = computeCase(sampleBank(), fields, null, null);
  return {
    id: '0c2f6d0e-7f0b-4c39-8a51-6a2f1c9d7e02',
    bankId: sampleBank().id,
    state: 'approved',
    version: 1,
    submittedAt: '2026-11-03T09:00:00.000Z',
    computed,
    findings: [],
    history: [],
    ...fields,
  };
}
