import type { PoolCheck } from '@/lib/fit';
import { countFailures, failureRate } from '@/lib/fit';

describe('the exact range of a rate of failures', () => {
  // Quantiles of chi² as printed in tables (from memory, checked against R's qchisq as remembered): the limits of a
  // count are half of them. chi²(.05; 20) = 10.851, chi²(.95; 22) = 33.924; chi²(.05; 2) = 0.10259, chi²(.95; 4) = 9.4877.
  it.each([
    [10, 10.851 / 2, 33.924 / 2],
    [1, 0.10259 / 2, 9.4877 / 2],
  ])('of %d failures is that of the chi² tables', (failures, lower, upper) => {
    const rate = failureRate(failures, 100);
    expect(rate.estimate).toBe(failures);
    expect(rate.lower).toBeCloseTo(lower, 3);
    expect(rate.upper).toBeCloseTo(upper, 3);
  });

  it('of 10 failures at 95 % is the one that poisson.test(10) prints in R (from memory)', () => {
    const { lower, upper } = failureRate(10, 100, 0.95);
    expect(lower).toBeCloseTo(4.795389, 5);
    expect(upper).toBeCloseTo(18.390356, 5);
  });

  it('of no failure starts at 0 and ends where none would be seen with 5 %: -ln 0.05 of them', () => {
    const { estimate, lower, upper } = failureRate(0, 250);
    expect([estimate, lower]).toEqual([0, 0]);
    expect(upper).toBeCloseTo((-Math.log(0.05) / 250) * 100, 8);
  });

  it.each([
    [1.5, 10],
    [-1, 10],
    [1, 0],
  ])('refuses %d failures in %d bank-years', (failures, bankYears) => {
    expect(() => failureRate(failures, bankYears)).toThrow(RangeError);
  });
});

describe('the count of failures', () => {
  const check = (bank: string, ageYears: number, more: Partial<PoolCheck> = {}) =>
    ({ bank, ageYears, ...more }) as PoolCheck;

  it('counts a bank once, and its years until it is known to have failed', () => {
    const checks = [
      check('a', 1),
      check('a', 4),
      check('b', 2),
      check('b', 3, { isKept: true, hasFailed: true }),
      check('b', 5, { hasFailed: true }),
      check('c', 6, { hasFailed: true }),
    ];
    expect(countFailures(checks)).toEqual({ failures: 2, bankYears: 4 + 3 + 6, banks: 3 });
  });

  it('of no checks is nothing', () => {
    expect(countFailures([])).toEqual({ failures: 0, bankYears: 0, banks: 0 });
  });
});
