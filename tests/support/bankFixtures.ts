import { randomUUID } from 'node:crypto';

import type { BankInput } from '@/lib/contract/banks';
import type { CheckInput } from '@/lib/contract/checks';
import { consent } from '@/lib/contract/consent';
import { CellType } from '@/server/db/models';

import type { TestClient } from './testServer';

/** A listed cell type of 280 Ah and 3.2 V, invented. */
export async function createCellType(overrides: Partial<CellType> = {}): Promise<CellType> {
  const id = overrides.id ?? 'gannet-280';
  return CellType.create({
    id,
    maker: 'Gannet',
    name: `Gannet ${id}`,
    format: 'prismatic',
    ratedAh: 280,
    nominalV: 3.2,
    status: 'listed',
    ...overrides,
  });
}

/** A bank of 16 cells in series, as a form would send it. */
export function bankInput(overrides: Partial<BankInput> = {}): BankInput {
  return {
    name: 'Barn',
    cellTypeId: 'gannet-280',
    parallel: 1,
    series: 16,
    firstUseMonth: '2023-03',
    bought: 'new',
    clamping: 'none',
    ...overrides,
  };
}

/**
 * A check of that bank which nothing is wrong with: 264 Ah at 56 A, 25 °C, 3.2 V a cell on average, so that
 * 264 Ah x 16 x 3.2 V = 13516.8 Wh and 264/56 h = 16971 s.
 */
export function checkInput(overrides: CheckOverrides = {}): CheckInput {
  return {
    idempotencyKey: overrides.idempotencyKey ?? randomUUID(),
    reading: {
      testedOn: '2026-10-03',
      method: 'countedDischarge',
      instrument: 'Shunt of 500 A',
      gainErrorFraction: 0.005,
      readingNoiseFraction: 0.002,
      capacityAh: 264,
      energyWh: 13516.8,
      meanCurrentA: 56,
      durationS: 16971,
      temperatureStartC: 25,
      temperatureEndC: 25,
      fullChargeEndedBy: 'voltageAndTail',
      restMinutes: 60,
      dischargeEndedBy: 'lowestCell',
      lowestCellAtFullV: 3.44,
      highestCellAtFullV: 3.46,
      lowestCellAtEndV: 2.6,
      highestCellAtEndV: 2.8,
      ...overrides.reading,
    },
    conditions: {
      depthFraction: 0.6,
      dischargeIt: 0.1,
      temperatureMeanC: 22,
      socMeanFraction: 0.55,
      counterKind: 'efc',
      counterValue: 780,
      ...overrides.conditions,
    },
    uploadId: overrides.uploadId ?? null,
    photoId: overrides.photoId ?? null,
    sources: overrides.sources ?? { capacityAh: 'metered', temperatureMeanC: 'readOff' },
    note: overrides.note ?? '',
    consent: overrides.consent ?? consent.version,
  };
}

interface CheckOverrides extends Partial<Omit<CheckInput, 'reading' | 'conditions'>> {
  reading?: Partial<CheckInput['reading']>;
  conditions?: Partial<CheckInput['conditions']>;
}

/** Creates a bank through the API; returns its id. */
export async function createBankOf(client: TestClient, overrides: Partial<BankInput> = {}): Promise<string> {
  const answer = await client.send('post', '/api/banks', bankInput(overrides));
  if (answer.status !== 201) throw new Error(`no bank was created: ${JSON.stringify(answer.body)}`);
  return answer.body.id as string;
}
