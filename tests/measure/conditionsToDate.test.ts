import fc from 'fast-check';
import { conditionsToDate, socMeanOf } from '@/lib/measure';
import type { PeriodConditions } from '@/lib/measure';

const period: PeriodConditions = {
  days: 365,
  efc: 200,
  depthFraction: 0.6,
  dischargeIt: 0.1,
  temperatureC: 20,
  socMeanFraction: 0.5,
  isClamped: false,
};

describe('conditionsToDate', () => {
  it('of one period are its own', () => {
    const { temperatureC, ...rest } = conditionsToDate([period]);
    expect(rest).toEqual({ depthFraction: 0.6, dischargeIt: 0.1, socMeanFraction: 0.5, isClamped: false });
    expect(temperatureC).toBeCloseTo(20, 10);
  });

  it('weigh depth and rate by cycles, charge level by time', () => {
    const later = {
      ...period,
      days: 730,
      efc: 600,
      depthFraction: 0.8,
      dischargeIt: 0.3,
      socMeanFraction: 0.8,
    };
    const result = conditionsToDate([period, later]);
    expect(result.depthFraction).toBeCloseTo((200 * 0.6 + 600 * 0.8) / 800, 12);
    expect(result.dischargeIt).toBeCloseTo((200 * 0.1 + 600 * 0.3) / 800, 12);
    expect(result.socMeanFraction).toBeCloseTo(0.7, 12);
  });

  it('lean to the warmer period as the rate law says', () => {
    const result = conditionsToDate([
      { ...period, temperatureC: 10 },
      { ...period, temperatureC: 40 },
    ]);
    // Mean of exp(-E/RT) at 283.15 and 313.15 K with E = 25 kJ/mol, solved for T: 27.94 °C.
    const speed = (kelvin: number) => Math.exp(-25 / (8.314e-3 * kelvin));
    const expected = -25 / (8.314e-3 * Math.log((speed(283.15) + speed(313.15)) / 2)) - 273.15;
    expect(result.temperatureC).toBeCloseTo(expected, 9);
    expect(result.temperatureC).toBeCloseTo(27.94, 2);
  });

  it('are clamped when more than half of the cycles were', () => {
    expect(conditionsToDate([period, { ...period, isClamped: true, efc: 201 }]).isClamped).toBe(true);
    expect(conditionsToDate([period, { ...period, isClamped: true }]).isClamped).toBe(false);
  });

  it('of a bank never cycled go by time', () => {
    const result = conditionsToDate([
      { ...period, efc: 0 },
      { ...period, efc: 0, depthFraction: 0.8 },
    ]);
    expect(result.depthFraction).toBeCloseTo(0.7, 12);
  });

  it('lie between the periods’ own', () => {
    const celsius = fc.double({ min: -10, max: 45, noNaN: true });
    fc.assert(
      fc.property(fc.array(celsius, { minLength: 1, maxLength: 6 }), (temperatures) => {
        const { temperatureC } = conditionsToDate(
          temperatures.map((value) => ({ ...period, temperatureC: value })),
        );
        expect(temperatureC).toBeGreaterThanOrEqual(Math.min(...temperatures) - 1e-6);
        expect(temperatureC).toBeLessThanOrEqual(Math.max(...temperatures) + 1e-6);
      }),
    );
  });

  it('need a period', () => {
    expect(() => conditionsToDate([])).toThrow(RangeError);
    expect(() => conditionsToDate([{ ...period, days: 0 }])).toThrow(RangeError);
  });
});

describe('socMeanOf', () => {
  const nothing = {
    socMeanFraction: null,
    socLowFraction: null,
    socHighFraction: null,
    idleDays: null,
    idleSocFraction: null,
  };
  it('is the mean that was given', () => {
    expect(
      socMeanOf({ ...nothing, socMeanFraction: 0.55, socLowFraction: 0.1, socHighFraction: 0.2 }, 365),
    ).toBe(0.55);
  });
  it('or the middle of the daily window', () => {
    expect(socMeanOf({ ...nothing, socLowFraction: 0.2, socHighFraction: 0.9 }, 365)).toBeCloseTo(0.55, 12);
  });
  it('with idle days at theirs', () => {
    const idle = { ...nothing, socLowFraction: 0.2, socHighFraction: 0.8, idleDays: 73, idleSocFraction: 1 };
    expect(socMeanOf(idle, 365)).toBeCloseTo(0.8 * 0.5 + 0.2, 12);
    expect(socMeanOf({ ...idle, idleDays: 500 }, 365)).toBe(1);
  });
  it('or not known', () => {
    expect(socMeanOf(nothing, 365)).toBeUndefined();
  });
});
