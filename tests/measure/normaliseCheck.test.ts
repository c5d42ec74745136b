import fc from 'fast-check';
import { budgetOf, defaultSettings, normaliseCapacity, normaliseCheck } from '@/lib/measure';
import type { ReadingValues } from '@/lib/measure';

const bank = { parallel: 1, series: 16, ratedAhCell: 240 };
const reading: ReadingValues = {
  testedOn: '2026-11-02',
  method: 'countedDischarge',
  capacityAh: 226.4,
  energyWh: 11_570,
  meanCurrentA: 48,
  temperatureStartC: 22,
  temperatureEndC: 25,
  gainErrorFraction: 0.005,
  readingNoiseFraction: 0.003,
  fullChargeEndedBy: 'voltageAndTail',
  lowestCellAtFullV: 3.58,
  highestCellAtFullV: 3.62,
  lowestCellAtEndV: 2.8,
  highestCellAtEndV: 2.95,
};
const relSdOf = (changes: Partial<ReadingValues>, name: string, series = 16) =>
  normaliseCheck({ ...reading, ...changes }, { ...bank, series }).budget.newEachCheck.find(
    (part) => part.name === name,
  )?.relSd ?? 0;

describe('normaliseCapacity', () => {
  // Expected values worked by hand from Q_ref = Q / [1 + kT (T - 25)] x (I/0.2)^(p-1), kT 0.004 and 0.001, p 1.01.
  it.each([
    [100, 25, 0.2, 100],
    [100, 20, 0.2, 100 / 0.98],
    [100, 30, 0.2, 100 / 1.005],
    [100, 25, 0.4, 100 * 2 ** 0.01],
    [100, 15, 0.05, (100 / 0.96) * 0.25 ** 0.01],
    [100, 35, 0.5, (100 / 1.01) * 2.5 ** 0.01],
  ])('%d Ah at %d °C and %d It are %d Ah at reference', (ah, temperatureC, meanIt, expected) => {
    const result = normaliseCapacity(ah, temperatureC, meanIt);
    expect(result.capacityRefAh).toBeCloseTo(expected, 12);
    expect(result).toMatchObject({ isCorrected: true, outside: [] });
  });

  it.each([
    [14.9, 0.2, ['temperature']],
    [35.1, 0.2, ['temperature']],
    [25, 0.049, ['rate']],
    [9, 0.6, ['temperature', 'rate']],
  ])('makes no correction at %d °C and %d It, and says why', (temperatureC, meanIt, outside) => {
    const result = normaliseCapacity(100, temperatureC, meanIt);
    expect(result).toMatchObject({ capacityRefAh: 100, factor: 1, isCorrected: false, outside });
  });

  it('takes other constants when they are given', () => {
    const settings = { ...defaultSettings, perKelvinBelow: 0.01, peukertExponent: 1 };
    expect(normaliseCapacity(100, 20, 0.4, settings).capacityRefAh).toBeCloseTo(100 / 0.95, 12);
  });

  it('refuses what is no test', () => {
    expect(() => normaliseCapacity(0, 25, 0.2)).toThrow(RangeError);
    expect(() => normaliseCapacity(100, NaN, 0.2)).toThrow(RangeError);
    expect(() => normaliseCapacity(100, 25, -1)).toThrow(RangeError);
  });
});

describe('normaliseCheck', () => {
  it('brings a reading to reference conditions', () => {
    const result = normaliseCheck(reading, bank);
    // 23.5 °C: 1 + 0.004 x (-1.5) = 0.994; 48 A of 240 Ah is 0.2 It.
    expect(result.capacityRefAh).toBeCloseTo(226.4 / 0.994, 9);
    expect(result.sohFraction).toBeCloseTo(226.4 / 0.994 / 240, 12);
    expect(result).toMatchObject({ meanIt: 0.2, meanTemperatureC: 23.5, isCorrected: true, outside: [] });
    // 11,570 Wh / 226.4 Ah / 16 cells, the worked example of the interface's design.
    expect(result.meanCellV).toBeCloseTo(3.194, 3);
  });

  it('reckons with the whole bank', () => {
    const result = normaliseCheck(
      { ...reading, capacityAh: 452.8, meanCurrentA: 96 },
      { ...bank, parallel: 2 },
    );
    expect(result.meanIt).toBeCloseTo(0.2, 12);
    expect(result.sohFraction).toBeCloseTo(226.4 / 0.994 / 240, 12);
  });

  it('prefers the mean temperature of a log, and adds its gaps', () => {
    const log = { meanTemperatureC: 20, gapChargeFraction: 0.1, gapRelSd: 0.02 };
    const result = normaliseCheck(reading, bank, log);
    expect(result.meanTemperatureC).toBe(20);
    expect(result.budget.newEachCheck[0]).toMatchObject({ name: 'logGaps', relSd: 0.02 });
  });

  it('keeps the meter’s own error out of what is new at each check', () => {
    const good = normaliseCheck(reading, bank);
    const poor = normaliseCheck({ ...reading, gainErrorFraction: 0.05 }, bank);
    expect(poor.relSdNew).toBe(good.relSdNew);
    // A limit of error is rectangular: JCGM 100:2008, 4.3.7.
    expect(poor.relSdMeter).toBeCloseTo(0.05 / Math.sqrt(3), 12);
    expect(poor.budget.sameEachCheck).toEqual([{ name: 'gain', relSd: poor.relSdMeter, varianceShare: 1 }]);
    expect(poor.expandedMeterAh).toBeCloseTo(2 * poor.relSdMeter * poor.capacityRefAh, 12);
  });

  it('adds its parts in quadrature, expands by 2, and shares out the variance', () => {
    const { budget, relSdNew, expandedAh, capacityRefAh } = normaliseCheck(reading, bank);
    const squares = budget.newEachCheck.reduce((sum, part) => sum + part.relSd ** 2, 0);
    expect(relSdNew).toBeCloseTo(Math.sqrt(squares), 14);
    expect(expandedAh).toBeCloseTo(2 * relSdNew * capacityRefAh, 12);
    expect(budget.newEachCheck.reduce((sum, part) => sum + part.varianceShare, 0)).toBeCloseTo(1, 12);
    // A careful check is good to about 1 % (judgement behind the pool's usual 1.2 %).
    expect(relSdNew).toBeGreaterThan(0.005);
    expect(relSdNew).toBeLessThan(0.012);
  });

  it('works the temperature part from half of kT and a kelvin of the sensors', () => {
    const factor = 1 / (1 + 0.004 * -5);
    const at20 = { temperatureStartC: 20, temperatureEndC: 20 };
    expect(relSdOf(at20, 'temperature')).toBeCloseTo(factor * Math.hypot(0.002 * 5, 0.004 * 1), 12);
  });

  it('works the rate part from the exponent', () => {
    expect(relSdOf({}, 'rate')).toBeCloseTo(0, 12);
    expect(relSdOf({ meanCurrentA: 96 }, 'rate')).toBeCloseTo(0.01 * Math.log(2), 12);
  });

  it('agrees with a numerical derivative of the formula', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 15.5, max: 24.5, noNaN: true }),
        fc.double({ min: 0.06, max: 0.49, noNaN: true }),
        (t, it) => {
          const at = (changes: Partial<typeof defaultSettings>, temperatureC = t) =>
            Math.log(
              normaliseCapacity(100, temperatureC, it, { ...defaultSettings, ...changes }).capacityRefAh,
            );
          const fromK =
            ((at({ perKelvinBelow: 0.00401 }) - at({ perKelvinBelow: 0.00399 })) / 0.00002) * 0.002;
          const fromT = (at({}, t + 0.01) - at({}, t - 0.01)) / 0.02;
          const fromP = ((at({ peukertExponent: 1.0101 }) - at({ peukertExponent: 1.0099 })) / 0.0002) * 0.01;
          const changes = { temperatureStartC: t, temperatureEndC: t, meanCurrentA: it * 240 };
          expect(relSdOf(changes, 'temperature')).toBeCloseTo(Math.hypot(fromK, fromT), 6);
          expect(relSdOf(changes, 'rate')).toBeCloseTo(Math.abs(fromP), 6);
        },
      ),
    );
  });

  it('grows when the cut-off was not reached, the charge not finished or the cells apart', () => {
    const base = (name: string) => relSdOf({}, name);
    expect(relSdOf({ lowestCellAtEndV: 3.1 }, 'cutOff')).toBeGreaterThan(5 * base('cutOff'));
    expect(relSdOf({ lowestCellAtEndV: 2.5 }, 'cutOff')).toBeGreaterThan(base('cutOff'));
    expect(relSdOf({ fullChargeEndedBy: 'time' }, 'fullCharge')).toBeGreaterThan(4 * base('fullCharge'));
    expect(relSdOf({ highestCellAtFullV: 3.38, lowestCellAtFullV: 3.37 }, 'fullCharge')).toBeGreaterThan(
      4 * base('fullCharge'),
    );
    expect(relSdOf({ highestCellAtEndV: 3.15 }, 'imbalance')).toBeGreaterThan(4 * base('imbalance'));
    expect(relSdOf({ lowestCellAtFullV: 3.36 }, 'imbalance')).toBeGreaterThan(4 * base('imbalance'));
    expect(relSdOf({ lowestCellAtFullV: null, highestCellAtEndV: null }, 'imbalance')).toBeCloseTo(
      0.004 * Math.SQRT2,
      12,
    );
    expect(relSdOf({ highestCellAtEndV: 3.15 }, 'imbalance', 1)).toBe(0);
    expect(relSdOf({ method: 'countedCharge' }, 'countedCharge')).toBe(0.005);
  });

  it('works the voltage parts along its lines of charge left and missing', () => {
    // At 2.8 V, read to 0.03 V: the line holds 0.0147 at 2.83 V and 0.0108 at 2.77 V, worked by hand.
    expect(relSdOf({}, 'cutOff')).toBeCloseTo((0.0147 - 0.0108) / 2, 12);
    // At 3.0 V 0.030 - 0.012 is left, a limit; beside it the line holds 0.042 and 0.0273.
    const at3 = Math.hypot(0.018 / Math.sqrt(3), (0.042 - 0.0273) / 2);
    expect(relSdOf({ lowestCellAtEndV: 3 }, 'cutOff')).toBeCloseTo(at3, 12);
    // Full at 3.5 and 3.6 V lack 0.004 and 0.001; at the end 3.0 and 2.8 V hold 0.030 and 0.012, half of it counted.
    const cells = {
      lowestCellAtFullV: 3.5,
      highestCellAtFullV: 3.6,
      lowestCellAtEndV: 2.8,
      highestCellAtEndV: 3,
    };
    expect(relSdOf(cells, 'imbalance')).toBeCloseTo(Math.hypot(0.003, 0.009) / Math.sqrt(3), 12);
    expect(relSdOf(cells, 'fullCharge')).toBeCloseTo(Math.hypot(0.003, 0.001 / Math.sqrt(3)), 12);
  });

  it('leaves nothing uncounted between a label test’s 3.65 and 2.5 V per cell (common practice, no source)', () => {
    const settings = { ...defaultSettings, cutOffCellV: 2.5, cellVoltageSd: 0 };
    const label = {
      highestCellAtFullV: 3.65,
      lowestCellAtFullV: 3.65,
      lowestCellAtEndV: 2.5,
      highestCellAtEndV: 2.5,
    };
    const parts = normaliseCheck({ ...reading, ...label }, bank, null, settings).budget.newEachCheck;
    expect(parts.find(({ name }) => name === 'cutOff')).toBeUndefined();
    expect(parts.find(({ name }) => name === 'imbalance')).toBeUndefined();
    expect(parts.find(({ name }) => name === 'fullCharge')?.relSd).toBe(
      settings.fullChargeRelSd.voltageAndTail,
    );
  });

  it('out of range stands as measured, with the missing correction in the budget', () => {
    const result = normaliseCheck({ ...reading, temperatureStartC: 5, temperatureEndC: 5 }, bank);
    expect(result).toMatchObject({ capacityRefAh: 226.4, isCorrected: false, outside: ['temperature'] });
    expect(result.budget.newEachCheck[0]?.name).toBe('notCorrected');
    expect(result.budget.newEachCheck[0]?.relSd).toBeCloseTo(1 / 0.92 - 1, 12);
  });
});

describe('budgetOf', () => {
  it('orders parts by size and leaves out those of nothing', () => {
    expect(
      budgetOf([
        { name: 'a', relSd: 3 },
        { name: 'b', relSd: 0 },
        { name: 'c', relSd: 4 },
      ]),
    ).toEqual([
      { name: 'c', relSd: 4, varianceShare: expect.closeTo(0.64, 12) },
      { name: 'a', relSd: 3, varianceShare: expect.closeTo(0.36, 12) },
    ]);
    expect(budgetOf([])).toEqual([]);
  });
});
