import { cellTypeOf } from '../cellTypes';
import { demoSeed, generateDemo } from '../generateDemo';
import { meanConditionFactor } from '../reading';
import { trueSoh } from '../truth';
import { type Dialect, isoDialect, milliDialect, preambleDialect, writeLog } from './dialects';
import { type DischargeTruth, simulateDischarge, type TestPlan } from './simulateDischarge';

/** A log to upload, and what it truly is. */
export interface DemoLog {
  file: string;
  text: string;
  truth: DischargeTruth & { bank: string; account: string };
}

interface LogPlan extends Pick<TestPlan, 'startsAt' | 'dischargeIt' | 'chargeV' | 'cutOffCellV' | 'roomC'> {
  file: string;
  /** Place of the bank in the scenario. */
  bank: number;
  account: string;
  dialect: Dialect;
  swingFraction: number;
  pause?: TestPlan['pause'];
}

const plans: LogPlan[] = [
  {
    ...{ file: 'house-bank-2026-11-07.csv', bank: 0, account: 'owner@demo.example', dialect: isoDialect },
    ...{ startsAt: '2026-11-07T07:00:00Z', dischargeIt: 0.2, chargeV: 3.5, cutOffCellV: 2.6, roomC: 21.5 },
    swingFraction: 0.02,
  },
  {
    ...{ file: 'workshop-2026-11-15.csv', bank: 1, account: 'owner@demo.example', dialect: preambleDialect },
    ...{ startsAt: '2026-11-15T08:20:00Z', dischargeIt: 0.15, chargeV: 3.55, cutOffCellV: 2.65, roomC: 19 },
    ...{ swingFraction: 0.04, pause: { atFraction: 0.45, seconds: 540 } },
  },
  {
    ...{ file: 'barn-2026-11-14.csv', bank: 2, account: 'owner2@demo.example', dialect: milliDialect },
    ...{ startsAt: '2026-11-14T09:40:00Z', dischargeIt: 0.2, chargeV: 3.5, cutOffCellV: 2.6, roomC: 18.5 },
    swingFraction: 0.05,
  },
];

/** How much warmer than the room the cells are over a test, about, K. */
const warmerC = 1.5;

/** The logs of three of the accounts' banks in November 2026: what the next check of each would stand on. */
export function createDemoLogs(): DemoLog[] {
  const { banks } = generateDemo();
  return plans.map(({ file, bank: place, account, dialect, ...plan }) => {
    const bank = banks[place]!;
    const { cellTypeId, parallel, series, name, clamping } = bank.fields;
    const ratedAh = cellTypeOf(cellTypeId).ratedAh * parallel;
    const { truth: last, fields } = bank.checks[bank.checks.length - 1]!;
    const days = (Date.parse(plan.startsAt) - Date.parse(fields.reading.testedOn)) / 86_400_000;
    const years = days / 365.2425;
    const lived = { ...last.since, isClamped: clamping !== 'none' };
    const soh = trueSoh(lived, last.ageYears + years, last.efc + years * last.since.efcPerYear, bank.truth);
    const seed = demoSeed + place;
    const capacityAh = ratedAh * soh * meanConditionFactor(plan.roomC + warmerC, plan.dischargeIt);
    const { moments, truth } = simulateDischarge({ ...plan, series, ratedAh, seed, capacityAh });
    return {
      file,
      text: writeLog(dialect, moments, plan.startsAt, seed),
      truth: { bank: name, account, ...rounded(truth) },
    };
  });
}

function rounded(truth: DischargeTruth): DischargeTruth {
  return {
    capacityAh: Number(truth.capacityAh.toFixed(3)),
    energyWh: Number(truth.energyWh.toFixed(1)),
    durationS: truth.durationS,
    startTemperatureC: Number(truth.startTemperatureC.toFixed(2)),
    endTemperatureC: Number(truth.endTemperatureC.toFixed(2)),
    lowestCellAtEndV: Number(truth.lowestCellAtEndV.toFixed(4)),
  };
}
