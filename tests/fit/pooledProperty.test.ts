import fc from 'fast-check';
import type { PoolCheck } from '@/lib/fit/poolCheck';
import { fitPool } from '@/lib/fit/pooled/fitPool';
import { findProblems } from '@/lib/fit/pooled/validate';
import { numbersIn } from '../support/pools';

jest.setTimeout(180_000);

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

/** Any check within the physical limits, however unlikely. */
const anyCheck = fc
  .record({
    bank: fc.integer({ min: 0, max: 8 }),
    isClamped: fc.boolean(),
    depthFraction: between(0.001, 1),
    dischargeIt: between(0.001, 10),
    temperatureC: between(-40, 80),
    socMeanFraction: between(0, 1),
    ageYears: between(0.001, 60),
    efc: between(0, 100_000),
    ratedAh: between(0.1, 1e5),
    share: between(0.001, 3),
    relSd: between(0.0005, 0.5),
  })
  .map(({ bank, share, ...check }): PoolCheck => ({
    ...{ ...check, capacityAh: check.ratedAh * share },
    ...{ bank: `B${bank}`, owner: `O${bank}`, cellType: `T${bank % 3}` },
  }));

describe('fitPool over any pool within the physical limits', () => {
  it('ends, and answers with finite numbers or a reason', () => {
    let fitted = 0;
    fc.assert(
      fc.property(fc.array(anyCheck, { minLength: 1, maxLength: 40 }), (checks) => {
        expect(findProblems(checks)).toEqual([]);
        const fit = fitPool(checks, { exponent: 0.5, isWithoutInteractions: true });
        if (!fit.ok) return expect(fit.reason).not.toBe('');
        fitted++;
        return expect(numbersIn(fit).filter(({ value }) => !Number.isFinite(value))).toEqual([]);
      }),
      { seed: 20261201, numRuns: 60 },
    );
    expect(fitted).toBeGreaterThan(20);
  });
});
