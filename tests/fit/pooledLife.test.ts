import { CholeskyDecomposition, Matrix } from 'ml-matrix';
import { bankRange } from '@/lib/fit/pooled/bankRange';
import { fadePoint, lnKept, lnLife } from '@/lib/fit/pooled/fade';
import { fitPool } from '@/lib/fit/pooled/fitPool';
import type { PooledFit } from '@/lib/fit/pooled/fitTypes';
import { capacityAt, fadeAt, lifeAt } from '@/lib/fit/pooled/life';
import { predictNewCheck } from '@/lib/fit/pooled/newCheck';
import { standardNormalCdf } from '@/lib/fit/pooled/normal';
import { at } from '@/lib/fit/pooled/parameters';
import { defaultPriors } from '@/lib/fit/pooled/priors';
import { statusOf, supportOf } from '@/lib/fit/pooled/support';
import { scenarioNamed } from '@/lib/fit/pooled/use';
import { createDice } from '@/scripts/bench/dice';
import { readPoolFixture } from '../support/pools';

const typical = scenarioNamed('typical');
const psi = defaultPriors.map(({ mean }) => mean);
const checks = readPoolFixture('pool-small');
const fit = fitted(fitPool(checks, { isWithoutInteractions: true }));

function fitted(result: ReturnType<typeof fitPool>): PooledFit {
  if (!result.ok) throw new Error(result.reason);
  return result;
}

describe('lnLife', () => {
  it('solves c0 + ln(1 - q) = ln 0.8', () => {
    const { lnYears } = lnLife({ psi, exponent: 0.5 }, typical);
    const { fade } = fadePoint({ psi, exponent: 0.5 }, typical, Math.exp(lnYears));
    expect(psi[at.c0]! + lnKept(fade)).toBeCloseTo(Math.log(0.8), 10);
  });

  it('has the gradient that finite differences have', () => {
    const inputs = { psi, exponent: 0.5, shift: 0.1 };
    const { gradient, shiftSlope } = lnLife(inputs, typical);
    psi.forEach((value, i) => {
      const step = 1e-5 * Math.max(1, Math.abs(value));
      const moved = (sign: number) =>
        lnLife({ ...inputs, psi: psi.map((v, j) => (j === i ? v + sign * step : v)) }, typical).lnYears;
      expect(gradient[i]!).toBeCloseTo((moved(1) - moved(-1)) / (2 * step), 5);
    });
    const shifted = (shift: number) => lnLife({ ...inputs, shift }, typical).lnYears;
    expect(shiftSlope).toBeCloseTo((shifted(0.1 + 1e-5) - shifted(0.1 - 1e-5)) / 2e-5, 5);
  });

  it('stays finite for a bank that is hardly cycled, and for one cycled without pause', () => {
    for (const efcPerYear of [0, 0.01, 5000]) {
      expect(Number.isFinite(lnLife({ psi, exponent: 0.5 }, { ...typical, efcPerYear }).lnYears)).toBe(true);
    }
  });
});

describe('lifeAt', () => {
  it('agrees with fade and capacity at its own end: 80 % left at T80', () => {
    const life = lifeAt(fit, typical);
    expect(capacityAt(fit, typical, life.years.estimate).estimate).toBeCloseTo(0.8, 2);
    expect(fadeAt(fit, typical, 8).estimate).toBeCloseTo(life.fadeAt8y.estimate, 12);
    expect(life.years.lower).toBeLessThan(life.years.estimate);
    expect(life.rangeOfBanks.lower).toBeLessThan(life.years.lower);
    expect(life.efc.estimate).toBeCloseTo(life.years.estimate * typical.efcPerYear, 9);
  });

  it('gives a cell type of few banks the figure of the pool, wider than the average one', () => {
    const few = fit.cellTypes.find(({ banks }) => banks < 10)!;
    const many = fit.cellTypes.find(({ banks }) => banks >= 20)!;
    const pooled = lifeAt(fit, typical, { cellType: few.cellType });
    expect(pooled.basis).toBe('pool');
    expect(pooled.lnT80.estimate).toBeCloseTo(lifeAt(fit, typical).lnT80.estimate, 10);
    expect(pooled.lnT80.se).toBeGreaterThan(lifeAt(fit, typical).lnT80.se);
    expect(lifeAt(fit, typical, { cellType: many.cellType }).basis).toBe('cellType');
  });

  it('gives a cell type that fades faster a shorter life', () => {
    const big = fit.cellTypes.filter(({ banks }) => banks >= 10).sort((a, b) => a.m - b.m);
    const [slow, fast] = [big[0]!, big[big.length - 1]!];
    const years = (cellType: string) => lifeAt(fit, typical, { cellType }).years.estimate;
    expect(years(slow.cellType)).toBeGreaterThan(years(fast.cellType));
  });

  it('names a condition outside the pool and the nearest value it supports', () => {
    const { outside } = lifeAt(fit, { ...typical, temperatureC: 60 });
    expect(outside).toHaveLength(1);
    expect(outside[0]).toMatchObject({ condition: 'temperatureC', value: 60 });
    expect(outside[0]!.nearest as number).toBeLessThan(40);
    expect(lifeAt(fit, typical).outside).toEqual([]);
  });

  it('refuses a use without physical sense, an unknown cell type and an age of 0', () => {
    expect(() => lifeAt(fit, { ...typical, depthFraction: 0 })).toThrow(RangeError);
    expect(() => lifeAt(fit, { ...typical, temperatureC: NaN })).toThrow(RangeError);
    expect(() => lifeAt(fit, typical, { cellType: 'none' })).toThrow(RangeError);
    expect(() => fadeAt(fit, typical, 0)).toThrow(RangeError);
  });

  it('works on the fit as JSON, as a page has it', () => {
    const page = JSON.parse(JSON.stringify(fit)) as PooledFit;
    expect(lifeAt(page, typical)).toEqual(lifeAt(fit, typical));
  });
});

describe('status and support', () => {
  it.each([
    [5, 'measured'],
    [6, 'measured'],
    [12, 'projected'],
    [18, 'extrapolated'],
    [18.1, 'beyond'],
  ])('calls a life of %d years at a reach of 6 %s', (years, status) => {
    expect(statusOf(years, 6)).toBe(status);
  });

  it.each([
    [0.25, 'shown'],
    [0.26, 'leans'],
    [0.5, 'leans'],
    [0.51, 'notMeasured'],
  ])('takes a prior share of %d as %s', (share, support) => {
    expect(supportOf(share)).toBe(support);
  });
});

describe('ranges that are integrated', () => {
  it('has the normal distribution function', () => {
    // Abramowitz & Stegun, table 26.1 (15 decimals there).
    expect(standardNormalCdf(0)).toBe(0.5);
    expect(standardNormalCdf(1)).toBeCloseTo(0.841344746068543, 13);
    expect(standardNormalCdf(-2)).toBeCloseTo(0.022750131948179, 13);
    expect(standardNormalCdf(4.5)).toBeCloseTo(0.999996602326875, 12);
  });

  it('has the range of banks and the interval of a new check as 20,000 seeded draws have them', () => {
    const component = fit.components.reduce((a, b) => (b.weight > a.weight ? b : a));
    const one = { ...fit, components: [{ ...component, weight: 1 }] };
    const size = component.psi.length;
    const matrix = Matrix.from1DArray(size, size, component.covariance);
    const factor = new CholeskyDecomposition(matrix).lowerTriangularMatrix;
    const dice = createDice(11);
    const lives: number[] = [];
    const shares: number[] = [];
    for (let draw = 0; draw < 20_000; draw++) {
      const z = component.psi.map(() => dice.normal());
      const drawn = component.psi.map(
        (value, i) => value + z.reduce((sum, zj, j) => sum + (j <= i ? factor.get(i, j) * zj : 0), 0),
      );
      const shift = Math.exp(drawn[at.lnSm]!) * dice.normal() + Math.exp(drawn[at.lnSu]!) * dice.normal();
      const start = Math.exp(drawn[at.lnSc]!) * dice.normal();
      const bank = drawn.map((value, i) => (i === at.c0 ? value + start : value));
      lives.push(Math.exp(lnLife({ psi: bank, exponent: component.exponent, shift }, typical).lnYears));
      const { fade } = fadePoint({ psi: bank, exponent: component.exponent, shift }, typical, 6);
      shares.push(Math.exp(bank[at.c0]! + lnKept(fade) + Math.exp(drawn[at.lnS]!) * dice.normal()));
    }
    const quantile = (values: number[], p: number) =>
      values.sort((a, b) => a - b)[Math.floor(p * values.length)]!;
    const [lower, upper] = bankRange(one.components, typical, { kind: 'average' });
    // 20,000 draws know a 10 % quantile of lives to about 1 %; integration is to first order in psi, and with 120
    // banks much of psi is unknown: within 6 %, where the range itself is a factor of 5.
    expect(Math.abs(Math.log(lower! / quantile(lives, 0.1)))).toBeLessThan(0.06);
    expect(Math.abs(Math.log(upper! / quantile(lives, 0.9)))).toBeLessThan(0.06);
    const check = predictNewCheck(one, typical, 6, 0.012);
    // A tenth of the interval's half width.
    const tolerance = 0.05 * (check.upper - check.lower);
    expect(Math.abs(check.lower - quantile(shares, 0.05))).toBeLessThan(tolerance);
    expect(Math.abs(check.upper - quantile(shares, 0.95))).toBeLessThan(tolerance);
  });
});
