import { fitPool } from '@/lib/fit/pooled/fitPool';
import { calendarShareAt, lifeAt, outlast, type PublishedFit, type Use } from '@/lib/fit/pooled/published';
import { createDice } from '@/scripts/bench/dice';
import { lnLife } from '@/lib/fit/pooled/fade';
import { CholeskyDecomposition, Matrix } from 'ml-matrix';

import { readPoolFixture } from '../support/pools';

const fit = fitted();
function fitted(): PublishedFit {
  const result = fitPool(readPoolFixture('pool-small'), { isWithoutInteractions: true, exponent: 0.5 });
  if (!result.ok) throw new Error(result.reason);
  return result;
}

const use: Use = {
  ...{ depthFraction: 0.7, dischargeIt: 0.2, temperatureC: 25, socMeanFraction: 0.6 },
  ...{ efcPerYear: 200, isClamped: false },
};
const own = fit.cellTypes.filter(({ banks, owners }) => banks >= 10 && owners >= 5);

describe('outlast', () => {
  const [one, two] = own.map(({ cellType }) => cellType) as [string, string];

  it('gives the ratio of both lives, and the mirror image the other way round', () => {
    const held = outlast(fit, use, one, two);
    const years = (cellType: string) => lifeAt(fit, use, { cellType }).years.estimate;
    expect(held.ratio.estimate).toBeCloseTo(years(one) / years(two), 9);
    const mirrored = outlast(fit, use, two, one);
    expect(mirrored.ratio.estimate).toBeCloseTo(1 / held.ratio.estimate, 12);
    expect(mirrored.probability).toBeCloseTo(1 - held.probability, 9);
  });

  it('has the probability that 5,000 draws of psi and both effects have, within 2.5 %', () => {
    const [component] = fit.components as [PublishedFit['components'][number]];
    const size = component.psi.length;
    const rows = Array.from({ length: size }, (_, i) => component.covariance.slice(i * size, (i + 1) * size));
    const lower = new CholeskyDecomposition(new Matrix(rows)).lowerTriangularMatrix;
    const dice = createDice(20261);
    const places = [one, two].map((id) => fit.cellTypes.findIndex(({ cellType }) => cellType === id));
    let longer = 0;
    const draws = 5_000;
    for (let k = 0; k < draws; k++) {
      const z = Array.from({ length: size }, () => dice.normal());
      const shift = lower.mmul(Matrix.columnVector(z)).to1DArray();
      const psi = component.psi.map((value, i) => value + shift[i]!);
      const [first, second] = places.map((place) => {
        const effect = component.cellTypes[place]!;
        const m =
          effect.m +
          effect.slope.reduce((sum, slope, i) => sum + slope * shift[i]!, 0) +
          Math.sqrt(effect.variance) * dice.normal();
        return lnLife({ psi, exponent: component.exponent, shift: m }, use).lnYears;
      }) as [number, number];
      if (first > second) longer += 1;
    }
    expect(Math.abs(longer / draws - outlast(fit, use, one, two).probability)).toBeLessThan(0.025);
  });

  it('is refused for a cell type against itself or an unknown one', () => {
    expect(() => outlast(fit, use, one, one)).toThrow(RangeError);
    expect(() => outlast(fit, use, one, 'nobody')).toThrow(RangeError);
  });
});

describe('calendarShareAt', () => {
  it('lies within its range and between 0 and 1, and falls with more full cycles a year', () => {
    const rested = calendarShareAt(fit, { ...use, efcPerYear: 20 }, 6);
    const worked = calendarShareAt(fit, { ...use, efcPerYear: 320 }, 6);
    for (const { estimate, lower, upper } of [rested, worked]) {
      expect(lower).toBeGreaterThan(0);
      expect(lower).toBeLessThan(estimate);
      expect(estimate).toBeLessThan(upper);
      expect(upper).toBeLessThan(1);
    }
    expect(worked.estimate).toBeLessThan(rested.estimate);
  });

  it('has the gradient that finite differences of ln GA - ln GB have', () => {
    const [component] = fit.components as [PublishedFit['components'][number]];
    const logit = (psi: readonly number[]) => {
      const share = calendarShareAt(
        { ...fit, components: [{ ...component, psi: [...psi] }] },
        use,
        6,
      ).estimate;
      return Math.log(share / (1 - share));
    };
    // The range by finite differences: gradient' V gradient, on the logit.
    const { psi, covariance } = component;
    const gradient = psi.map((value, i) => {
      const step = 1e-5;
      const moved = (sign: number) => psi.map((v, j) => (j === i ? value + sign * step : v));
      return (logit(moved(1)) - logit(moved(-1))) / (2 * step);
    });
    let variance = 0;
    gradient.forEach((a, i) =>
      gradient.forEach((b, j) => (variance += a * b * covariance[i * psi.length + j]!)),
    );
    const range = calendarShareAt(fit, use, 6);
    const half = (Math.log(range.upper / (1 - range.upper)) - Math.log(range.lower / (1 - range.lower))) / 2;
    expect(half / (fit.tQuantile * Math.sqrt(variance))).toBeCloseTo(1, 4);
  });
});
