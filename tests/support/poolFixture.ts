import { randomUUID } from 'node:crypto';

import { uniformFloat64 } from 'pure-rand/distribution/uniformFloat64';
import { xoroshiro128plus } from 'pure-rand/generator/xoroshiro128plus';

import type { CheckFields, CheckState, Computed } from '@/lib/contract/checks';
import { Bank, CellType, Check, User } from '@/server/db/models';

interface CellTypeOptions {
  id?: string;
  ratedAh?: number;
  status?: CellType['status'];
}

/** A listed cell type of 100 Ah. */
export async function addCellType({
  id = 'skerry-100',
  ratedAh = 100,
  status = 'listed',
}: CellTypeOptions = {}) {
  return CellType.create({
    id,
    maker: 'Tidewright',
    name: id,
    format: 'prismatic',
    ratedAh,
    nominalV: 3.2,
    status,
  });
}

let ownerCount = 0;

export async function addOwner(): Promise<User> {
  ownerCount += 1;
  return User.create({
    email: `bank-owner${ownerCount}@example.org`,
    passwordHash: 'not-a-hash',
    role: 'owner',
    emailVerifiedAt: new Date('2020-01-01T00:00:00Z'),
  });
}

interface BankOptions {
  ownerId: string;
  cellTypeId?: string;
  bought?: Bank['bought'];
  clamping?: Bank['clamping'];
}

let pseudonymCount = 0;

/** A 1p16s bank in use since June 2020. */
export async function addBank({
  ownerId,
  cellTypeId = 'skerry-100',
  bought = 'new',
  clamping = 'none',
}: BankOptions) {
  pseudonymCount += 1;
  const unknown = {
    madeMonth: null,
    startCapacityAh: null,
    clampForceN: null,
    clampTorqueNm: null,
    spacingMm: null,
  };
  const unset = { place: null, climateBand: null, chargeLimitV: null, dischargeLimitV: null };
  const more = {
    bmsHighTripV: null,
    bmsLowTripV: null,
    priceMinor: null,
    priceCurrency: null,
    priceMonth: null,
  };
  return Bank.create({
    ...unknown,
    ...unset,
    ...more,
    ownerId,
    pseudonym: `T${String(pseudonymCount).padStart(4, '0')}`,
    name: 'In the shed',
    cellTypeId,
    parallel: 1,
    series: 16,
    firstUseMonth: '2020-06',
    bought,
    clamping,
    sources: {},
  });
}

export interface CheckOptions {
  bankId: string;
  /** Years after first use: the check's day is 15 June of that year. */
  years: number;
  efc: number;
  sohFraction: number;
  state?: CheckState;
  severity?: number;
  submittedAt?: string;
  relSdNew?: number;
  conditions?: Partial<CheckFields['conditions']>;
}

/** A check as submitCheck would leave it, stored directly. */
export async function addCheck(options: CheckOptions): Promise<Check> {
  const { bankId, years, efc, sohFraction, state = 'approved', severity = 0, relSdNew = 0.01 } = options;
  const testedOn = `${2020 + years}-06-15`;
  return Check.create({
    bankId,
    state,
    idempotencyKey: randomUUID(),
    testedOn,
    reading: reading(testedOn, sohFraction * 100),
    conditions: { ...conditions(efc), ...options.conditions },
    sources: {},
    note: '',
    uploadId: null,
    computed: computed({ years, efc, sohFraction, relSdNew }),
    ageYears: years,
    efc,
    sohFraction,
    severity,
    submittedAt: new Date(options.submittedAt ?? '2026-11-01T08:00:00Z'),
  });
}

interface OwnerBank {
  ownerId: string;
  bank: Bank;
  checks: Check[];
}

/**
 * An owner with one bank and yearly checks that fade as 0.06 (EFC/500)^0.8, with noise of 0.5 % and a spread of use
 * between owners, drawn from the seed.
 */
export async function addOwnerWithChecks(
  seed: number,
  options: Partial<BankOptions> &
    Pick<Partial<CheckOptions>, 'state' | 'conditions'> & { checks?: number } = {},
): Promise<OwnerBank> {
  const random = xoroshiro128plus(seed);
  const draw = () => uniformFloat64(random);
  // The first numbers of neighbouring seeds are alike.
  for (let skipped = 0; skipped < 20; skipped += 1) draw();
  const ownerId = options.ownerId ?? (await addOwner()).id;
  const bank = await addBank({ ...options, ownerId });
  const efcPerYear = 120 + 160 * draw();
  const checks: Check[] = [];
  for (let years = 1; years <= (options.checks ?? 4); years += 1) {
    const efc = efcPerYear * years;
    const sohFraction = 1 - 0.06 * (efc / 500) ** 0.8 + 0.01 * (draw() - 0.5);
    const { state, conditions: given } = options;
    checks.push(await addCheck({ bankId: bank.id, years, efc, sohFraction, state, conditions: given }));
  }
  return { ownerId, bank, checks };
}

function reading(testedOn: string, capacityAh: number): CheckFields['reading'] {
  return {
    testedOn,
    method: 'countedDischarge',
    instrument: 'shunt',
    gainErrorFraction: 0.005,
    readingNoiseFraction: 0.001,
    capacityAh,
    energyWh: capacityAh * 51.2,
    meanCurrentA: 20,
    durationS: (capacityAh / 20) * 3600,
    temperatureStartC: 24,
    temperatureEndC: 26,
    fullChargeEndedBy: 'voltageAndTail',
    restMinutes: 30,
    dischargeEndedBy: 'lowestCell',
    endedByCell: null,
    lowestCellAtFullV: 3.46,
    highestCellAtFullV: 3.5,
    lowestCellAtEndV: 2.8,
    highestCellAtEndV: 2.9,
  };
}

function conditions(efc: number): CheckFields['conditions'] {
  return {
    depthFraction: 0.6,
    dischargeIt: 0.1,
    chargeIt: null,
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
    counterValue: efc,
    cyclesPerDay: null,
    idleDays: null,
    idleSocFraction: null,
  };
}

function computed(of: { years: number; efc: number; sohFraction: number; relSdNew: number }): Computed {
  const capacityRefAh = of.sohFraction * 100;
  return {
    ageYears: of.years,
    capacityRefAh,
    sohFraction: of.sohFraction,
    isCorrected: true,
    meanIt: 0.2,
    meanTemperatureC: 25,
    meanCellV: 3.2,
    relSdMeter: 0.003,
    relSdNew: of.relSdNew,
    expandedAh: 2 * Math.hypot(0.003, of.relSdNew) * capacityRefAh,
    budget: { sameEachCheck: [], newEachCheck: [] },
    efc: of.efc,
    efcFromCounter: of.efc,
    efcFromDepth: null,
    efcDisagreement: null,
  };
}
