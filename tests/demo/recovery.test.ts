import { cellTypes } from '@/data/demo/cellTypes';
import { generateDemo } from '@/data/demo/generateDemo';
import { scenarios, trueYearsTo80, truth } from '@/data/demo/truth';
import { fitPool, lifeAt } from '@/lib/fit';
import { computeBank } from '@/server/seed/demoChecks';
import { demoPool } from '@/server/seed/demoPool';

const demo = generateDemo();

const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
const sdOf = (values: number[]) => {
  const centre = mean(values);
  return Math.sqrt(mean(values.map((value) => (value - centre) ** 2)));
};

/** Approved checks of banks that did not drift apart, with what the product made of each. */
const sound = demo.banks
  .filter(({ events }) => events.every(({ kind }) => kind !== 'rebalanced'))
  .flatMap((bank) => computeBank(bank).map((one) => ({ bank, ...one })))
  .filter(({ check }) => check.state === 'approved');

describe('the readings of the demo', () => {
  test.each([0, 1, 2, 3, 4, 5, 6, 7])('have the true mean capacity from year %i to the next', (year) => {
    const inYear = sound.filter(({ check }) => Math.floor(check.truth.ageYears) === year);
    expect(inYear.length).toBeGreaterThan(100);
    const error = inYear.map(({ computed, check }) => computed.sohFraction / check.truth.sohFraction - 1);
    // The meters' gains (sd about 0.5 %), noise and tests out of range (up to 5 % low) leave a mean within 0.4 %.
    expect(Math.abs(mean(error))).toBeLessThan(0.004);
    expect(sdOf(error)).toBeGreaterThan(0.006);
    expect(sdOf(error)).toBeLessThan(0.02);
  });

  test('report conditions with the errors of their source', () => {
    const errors = (source: string) =>
      sound
        .filter(({ check }) => check.fields.sources.temperatureMeanC === source)
        .filter(({ check }) => check.fields.conditions.temperatureOf === 'cells')
        .map(({ check }) => check.fields.conditions.temperatureMeanC - check.truth.since.temperatureC);
    const depthErrors = (source: string) =>
      sound
        .filter(({ check }) => check.fields.sources.depthFraction === source)
        .map(({ check }) =>
          Math.log(check.fields.conditions.depthFraction / check.truth.since.depthFraction),
        );
    // The sizes the README states; 15 % of slack for some 350 banks and the rounding of entries.
    expect(sdOf(errors('estimated'))).toBeGreaterThan(1.7);
    expect(sdOf(errors('estimated'))).toBeLessThan(2.3);
    expect(sdOf(errors('metered'))).toBeLessThan(0.5);
    expect(sdOf(depthErrors('estimated'))).toBeGreaterThan(0.085);
    expect(sdOf(depthErrors('estimated'))).toBeLessThan(0.12);
    expect(sdOf(depthErrors('metered'))).toBeLessThan(0.04);
  });

  test('count the cycles that were truly done', () => {
    const counted = sound.filter(({ computed }) => computed.efcFromCounter !== null);
    expect(counted.length).toBeGreaterThan(2000);
    const error = counted.map(({ computed, check }) => computed.efcFromCounter! / check.truth.countedEfc - 1);
    expect(Math.abs(mean(error))).toBeLessThan(0.003);
    expect(sdOf(error)).toBeLessThan(0.03);
  });
});

describe('the pooled fit of the demo', () => {
  const named = Object.entries(scenarios).map(([name, use]) => ({ name, ...use }));
  const fit = fitPool(demoPool(demo.banks), { scenarios: named, isWithoutInteractions: true });
  if (!fit.ok) throw new Error(fit.reason);

  test.each(['standard', 'typical', 'hard'] as const)('covers the true life at %s use', (name) => {
    const life = fit.lifetimes.find(({ scenario }) => scenario === name)!;
    const years = trueYearsTo80(scenarios[name]);
    expect(life.years.lower).toBeLessThan(years);
    expect(life.years.upper).toBeGreaterThan(years);
    // An interval that covers by being wide would say nothing.
    expect(life.years.upper / life.years.lower).toBeLessThan(1.4);
  });

  test.each(['c0', 'lnB', 'z', 'bD'] as const)('finds %s within 3 standard errors', (name) => {
    const row = fit.parameters.find((parameter) => parameter.name === name)!;
    expect(Math.abs(row.estimate - truth[name])).toBeLessThan(3 * row.se);
  });

  test('orders the cell types as they truly are', () => {
    const known = fit.cellTypes.filter(({ banks }) => banks >= 10);
    expect(known.length).toBe(20);
    const t = known.map(({ cellType, m, se }) => {
      const { effect } = cellTypes.find(({ id }) => id === cellType)!;
      return (m - effect) / Math.hypot(se, 0.03);
    });
    // Effects stand to the average of the cell types in the pool, which is not quite zero: 0.03 for that.
    expect(Math.max(...t.map(Math.abs))).toBeLessThan(3.5);
  });

  test('shows all four statuses at the standard use', () => {
    const statuses = cellTypes.map(({ id }) => lifeAt(fit, scenarios.standard, { cellType: id }).status);
    expect(new Set(statuses)).toEqual(new Set(['measured', 'projected', 'extrapolated', 'beyond']));
  });
});
