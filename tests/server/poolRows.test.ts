import { type PooledBank, type PooledCheck, poolRows } from '@/server/pool/poolRow';

const bank: PooledBank = {
  id: 'bank',
  ownerId: 'owner',
  cellTypeId: 'skerry-100',
  ratedAh: 200,
  firstUseMonth: '2020-06',
  isClampedNow: false,
  clampingChangedOn: [],
  failedOn: [],
};

const conditions: PooledCheck['conditions'] = {
  depthFraction: 0.4,
  dischargeIt: 0.1,
  chargeIt: null,
  peakIt: null,
  temperatureMeanC: 20,
  temperatureHottestC: null,
  temperatureColdestC: null,
  temperatureOf: 'cells',
  coldestChargingC: null,
  socMeanFraction: 0.5,
  socLowFraction: null,
  socHighFraction: null,
  counterKind: 'efc',
  counterValue: 100,
  cyclesPerDay: null,
  idleDays: null,
  idleSocFraction: null,
};

function check(year: number, efc: number, changes: Partial<PooledCheck['conditions']> = {}): PooledCheck {
  return {
    id: `check-${year}`,
    testedOn: `${year}-06-15`,
    ageYears: year - 2020,
    efc,
    capacityRefAh: 190,
    relSdNew: 0.01,
    isRealFailure: false,
    conditions: { ...conditions, ...changes },
    sources: { temperatureMeanC: 'metered', socMeanFraction: 'readOff' },
  };
}

const rowsOf = (of: Partial<PooledBank>, checks: PooledCheck[]) =>
  poolRows({ ...bank, ...of }, checks).map(({ row }) => row);

describe('conditions to date', () => {
  it('weighs depth and rate by full cycles', () => {
    // 100 EFC at 40 %, then 300 at 80 %: (100 x 0.4 + 300 x 0.8) / 400 = 0.7.
    const [, second] = rowsOf({}, [
      check(2021, 100),
      check(2022, 400, { depthFraction: 0.8, dischargeIt: 0.3 }),
    ]);
    expect(second?.depthFraction).toBeCloseTo(0.7, 12);
    expect(second?.dischargeIt).toBeCloseTo(0.25, 12);
  });

  it('weighs state of charge by time, taking the middle of a window', () => {
    const [, second] = rowsOf({}, [
      check(2021, 100),
      check(2022, 400, { socMeanFraction: null, socLowFraction: 0.6, socHighFraction: 1 }),
    ]);
    // 365 days at 0.5 and 365 at 0.8.
    expect(second?.socMeanFraction).toBeCloseTo(0.65, 12);
  });

  it('weighs temperature by Arrhenius with 25 kJ/mol', () => {
    const [, second] = rowsOf({}, [check(2021, 100), check(2022, 200, { temperatureMeanC: 40 })]);
    // Closed form: mean of exp(-E/RT) over equal times at 293.15 K and 313.15 K, turned back into a temperature.
    const weight = (kelvin: number) => Math.exp(-25_000 / 8.314 / kelvin);
    const mean = (weight(293.15) + weight(313.15)) / 2;
    expect(second?.temperatureC).toBeCloseTo(-25_000 / 8.314 / Math.log(mean) - 273.15, 6);
    expect(second?.temperatureC).toBeGreaterThan(30);
  });

  it('keeps age, full cycles and capacity of each check', () => {
    const [first] = rowsOf({}, [check(2021, 100)]);
    expect(first).toMatchObject({ ageYears: 1, efc: 100, capacityAh: 190, ratedAh: 200, relSd: 0.01 });
  });

  it('takes a check in the month of first use for a day old', () => {
    const [first] = rowsOf({}, [{ ...check(2020, 0), testedOn: '2020-06-03', ageYears: 0 }]);
    expect(first?.ageYears).toBeCloseTo(1 / 365.2425, 12);
  });

  it('carries the worst source so far, and takes the air for an estimate', () => {
    const rows = rowsOf({}, [check(2021, 100), check(2022, 200, { temperatureOf: 'air' }), check(2023, 300)]);
    expect(rows.map(({ temperatureSource }) => temperatureSource)).toEqual([
      'metered',
      'estimated',
      'estimated',
    ]);
    expect(rows[0]?.socSource).toBe('readOff');
  });
});

describe('clamping', () => {
  it('is that of the bank while nothing changed', () => {
    expect(rowsOf({ isClampedNow: true }, [check(2021, 100)])[0]?.isClamped).toBe(true);
  });

  it('counts as clamped only once more than half of the full cycles were', () => {
    // Clamped since 15 June 2021: 100 EFC without, then 50 and 100 with.
    const rows = rowsOf({ isClampedNow: true, clampingChangedOn: ['2021-06-15'] }, [
      check(2021, 100),
      check(2022, 150),
      check(2023, 250),
    ]);
    expect(rows.map(({ isClamped }) => isClamped)).toEqual([false, false, true]);
    expect(rows.every(({ isClampingUnclear }) => !isClampingUnclear)).toBe(true);
  });

  it('splits a period in which it changed by time', () => {
    // Changed on 1 Dec 2020, 169 of 365 days in: the larger part of the cycles of the first year was clamped.
    const changed = { isClampedNow: true, clampingChangedOn: ['2020-12-01'] };
    expect(rowsOf(changed, [check(2021, 100)])[0]?.isClamped).toBe(true);
    const later = { isClampedNow: true, clampingChangedOn: ['2021-02-01'] };
    expect(rowsOf(later, [check(2021, 100)])[0]?.isClamped).toBe(false);
  });

  it('is unclear after a second change', () => {
    const rows = rowsOf({ clampingChangedOn: ['2020-12-01', '2021-12-01'] }, [
      check(2021, 100),
      check(2022, 200),
    ]);
    expect(rows.map(({ isClampingUnclear }) => isClampingUnclear)).toEqual([false, true]);
  });
});

describe('failures', () => {
  const years = [check(2021, 100), check(2022, 200), check(2023, 300)];
  const failedAt = (of: Partial<PooledBank>, checks = years) =>
    rowsOf(of, checks).map(({ isKept, hasFailed }) => [isKept, hasFailed]);
  const sound = [undefined, undefined];

  it('are told from the first check after the event', () => {
    expect(failedAt({ failedOn: ['2022-01-01'] })).toEqual([sound, [undefined, true], [undefined, true]]);
  });

  it('are told with the last check where there is none after the event', () => {
    expect(failedAt({ failedOn: ['2024-01-01'] })).toEqual([sound, sound, [undefined, true]]);
  });

  it('keep the check that was marked as one', () => {
    const marked = years.map((one, i) => ({ ...one, isRealFailure: i === 1 }));
    expect(failedAt({}, marked)).toEqual([sound, [true, true], [undefined, true]]);
  });
});
