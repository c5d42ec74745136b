import type { CheckFields } from '@/lib/contract/checks';

import { cellTypeOf } from './cellTypes';
import { type Draws, held, toStep } from './random';
import { truth as world } from './truth';
import type { DemoBank, Meter } from './types';

export type Reading = CheckFields['reading'];

/** What a test finds: the bank's true capacity and how the test was made. */
export interface TestFacts {
  testedOn: string;
  /** Capacity at reference conditions over the rating, imbalance included. */
  sohFraction: number;
  ageYears: number;
  imbalanceMv: number;
  isCold?: boolean;
  /** Done as the guide says: full by voltage and tail current, ended by the lowest cell, in a mild room. */
  isBySteadyHand?: boolean;
}

const meters: Omit<Meter, 'gain'>[] = [
  { instrument: 'Shunt and counter, class 0.5', gainErrorFraction: 0.005, readingNoiseFraction: 0.002 },
  { instrument: 'Shunt and counter, class 1', gainErrorFraction: 0.01, readingNoiseFraction: 0.003 },
  { instrument: 'Clip-on Hall sensor', gainErrorFraction: 0.02, readingNoiseFraction: 0.006 },
  { instrument: 'Counter of the BMS', gainErrorFraction: 0.02, readingNoiseFraction: 0.005 },
  { instrument: 'Display of the inverter', gainErrorFraction: 0.03, readingNoiseFraction: 0.01 },
];

export function drawMeter(draws: Draws): Meter {
  const place = Number(draws.weighted({ '0': 0.28, '1': 0.3, '2': 0.12, '3': 0.22, '4': 0.08 }));
  const meter = meters[place]!;
  // A stated limit of error is hardly ever used up: sd of a third of it.
  const third = meter.gainErrorFraction / 3;
  return { ...meter, gain: 1 + draws.normalWithin(0, third, -3 * third, 3 * third) };
}

/** Capacity over its value at 25 °C and 0.2 It, for the demo's average cell. */
export function meanConditionFactor(temperatureC: number, testIt: number): number {
  return conditionFactor(temperatureC, testIt, {
    perKelvinBelow: 0.004,
    perKelvinAbove: 0.001,
    exponent: 1.01,
  });
}

interface CellManners {
  perKelvinBelow: number;
  perKelvinAbove: number;
  exponent: number;
}

function conditionFactor(temperatureC: number, testIt: number, manners: CellManners): number {
  const perKelvin = temperatureC < 25 ? manners.perKelvinBelow : manners.perKelvinAbove;
  return (1 + perKelvin * (temperatureC - 25)) * (testIt / 0.2) ** (1 - manners.exponent);
}

/** How one bank's cells take to cold, heat and current: near the average. */
function drawManners(draws: Draws): CellManners {
  return {
    perKelvinBelow: draws.normal(0.004, 0.0008),
    perKelvinAbove: draws.normal(0.001, 0.0004),
    exponent: draws.normal(1.01, 0.004),
  };
}

/** Mean voltage of a LFP cell over a full discharge (or charge): further from rest with current and in the cold. */
function meanCellVoltage(
  method: Reading['method'],
  testIt: number,
  temperatureC: number,
  ageYears: number,
): number {
  const apart = 0.17 * testIt * (1 + 0.03 * ageYears) + 0.0012 * Math.max(0, 25 - temperatureC);
  return method === 'countedDischarge' ? 3.236 - apart : 3.3 + apart;
}

/** Makes the reading of a test: charge, energy, current, time and voltages of the whole bank that go together. */
export function drawReading(
  draws: Draws,
  bank: Pick<DemoBank, 'fields' | 'truth'>,
  meter: Meter,
  test: TestFacts,
): Reading {
  const { fields, truth } = bank;
  const ratedAh = cellTypeOf(fields.cellTypeId).ratedAh * fields.parallel;
  const currentA = toStep(ratedAh * truth.testIt * Math.exp(draws.normal(0, 0.03)), 0.1);
  const testIt = currentA / ratedAh;
  const isSteady = test.isBySteadyHand ?? false;
  const roomC = draws.normalWithin(indoorC(fields.place), isSteady ? 1.2 : 3.8, 11, 33);
  const start = test.isCold ? draws.uniform(6.5, 8) : roomC;
  const end = start + 1 + 9 * testIt + draws.uniform(0, 1);
  const meanC = (start + end) / 2;
  const noise = draws.normal(0, Math.hypot(meter.readingNoiseFraction, world.repeatSd));
  const capacityAh =
    ratedAh *
    test.sohFraction *
    conditionFactor(meanC, testIt, drawManners(draws)) *
    meter.gain *
    (1 + noise);
  const method = isSteady || draws.chance(0.94) ? 'countedDischarge' : 'countedCharge';
  const cellV = meanCellVoltage(method, testIt, meanC, test.ageYears) * (1 + draws.normal(0, 0.0015));
  const shown = toStep(capacityAh, 0.1);
  return {
    testedOn: test.testedOn,
    method,
    instrument: meter.instrument,
    gainErrorFraction: meter.gainErrorFraction,
    readingNoiseFraction: meter.readingNoiseFraction,
    capacityAh: shown,
    energyWh: Math.round(shown * cellV * fields.series),
    meanCurrentA: currentA,
    durationS: Math.round((capacityAh / currentA) * 60) * 60,
    temperatureStartC: toStep(start, 0.5),
    temperatureEndC: toStep(end, 0.5),
    fullChargeEndedBy: isSteady
      ? 'voltageAndTail'
      : draws.weighted({ voltageAndTail: 0.8, bms: 0.16, time: 0.04 }),
    restMinutes: draws.chance(0.85) ? draws.pick([15, 30, 30, 60, 120]) : null,
    ...drawEnd(draws, { ...test, series: fields.series, chargeLimitV: fields.chargeLimitV ?? 3.55 }),
  };
}

const indoorC = (place: string | null) => (place === 'indoors' || place === null ? 22.5 : 20.5);

interface EndFacts {
  series: number;
  imbalanceMv: number;
  chargeLimitV: number;
  isBySteadyHand?: boolean;
}

function drawEnd(draws: Draws, { series, imbalanceMv, chargeLimitV, isBySteadyHand = false }: EndFacts) {
  const spreadFull = imbalanceMv * Math.exp(draws.normal(0, 0.2));
  const spreadEnd = 60 + 4 * imbalanceMv * Math.exp(draws.normal(0, 0.2));
  const ended = draws.weighted({ lowestCell: 0.74, bankVoltage: 0.19, bmsTrip: 0.07 });
  const dischargeEndedBy = isBySteadyHand ? 'lowestCell' : ended;
  const lowestAtEnd = dischargeEndedBy === 'bmsTrip' ? 2.5 : draws.pick([2.5, 2.55, 2.6, 2.6, 2.65, 2.7]);
  const highestAtFull = chargeLimitV + draws.uniform(0, 0.02);
  const knowsAll = draws.chance(0.8) || isBySteadyHand;
  const volts = (value: number) => toStep(held(value, 2.0, 4.0), 0.001);
  return {
    dischargeEndedBy,
    endedByCell: dischargeEndedBy === 'lowestCell' && draws.chance(0.6) ? String(draws.int(1, series)) : null,
    lowestCellAtFullV: knowsAll ? volts(highestAtFull - spreadFull / 1000) : null,
    highestCellAtFullV: volts(highestAtFull),
    lowestCellAtEndV: volts(lowestAtEnd + draws.uniform(-0.004, 0.004)),
    highestCellAtEndV: knowsAll ? volts(Math.min(lowestAtEnd + spreadEnd / 1000, 3.05)) : null,
  };
}
