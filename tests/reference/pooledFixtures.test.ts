import { fitPool } from '@/lib/fit/pooled/fitPool';
import type { PooledFit } from '@/lib/fit/pooled/fitTypes';
import { bankRange } from '@/lib/fit/pooled/bankRange';
import { readPlantedOutliers, readPoolFixture, readPoolReference } from '../support/pools';

// Source of every expected number: the fixtures' R references (TMB, 15-point adaptive Gauss-Hermite).
// Tolerances: parameters 0.01 SE, SEs 2 %, lives and sds to 3 significant figures.

function fitFixture(name: string, isScreening: boolean): PooledFit {
  const fit = fitPool(readPoolFixture(name), { exponent: 0.5, isScreening });
  if (!fit.ok) throw new Error(fit.reason);
  return fit;
}

const toThreeFigures = (value: number) => Number(value.toPrecision(3));
const withinThreeFigures = (value: number, expected: number) =>
  Math.abs(value - expected) <= 0.00501 * 10 ** Math.floor(Math.log10(Math.abs(expected)));

describe.each(['pool-small', 'pool-medium'])('%s, exponent 0.5, screening off, against R', (name) => {
  const reference = readPoolReference(name);
  const fit = fitFixture(name, false);

  it('counts the same rows, banks and cell types', () => {
    expect(fit.data).toMatchObject({
      used: reference.rows,
      banks: reference.banks,
      cellTypes: reference.models,
    });
  });

  it.each(Object.keys(reference.estimates))('has %s within 0.01 SE, and its SE within 2 %%', (parameter) => {
    const { estimate, se } = reference.estimates[parameter]!;
    const row = fit.parameters.find((one) => one.name === parameter)!;
    expect(Math.abs(row.estimate - estimate) / se).toBeLessThan(0.01);
    expect(Math.abs(row.se / se - 1)).toBeLessThan(0.02);
  });

  it('has the whole covariance, as correlations within 0.01', () => {
    const se = reference.covariance.map((row, i) => Math.sqrt(row[i]!));
    fit.covariance.forEach((row, i) =>
      row.forEach((value, j) => {
        const expected = reference.covariance[i]![j]! / (se[i]! * se[j]!);
        const own = Math.sqrt(fit.covariance[i]![i]! * fit.covariance[j]![j]!);
        // The file rounds at 8 decimals, which the smallest covariances (c0) feel.
        const rounding = 1e-8 / (se[i]! * se[j]!);
        expect(Math.abs(value / own - expected)).toBeLessThan(0.01 + rounding);
      }),
    );
  });

  it('has the four standard deviations to 3 significant figures', () => {
    for (const [key, expected] of Object.entries(reference.sd)) {
      const { estimate } = fit.parameters.find((row) => row.name === `ln_${key}`)!;
      expect(withinThreeFigures(Math.exp(estimate), expected)).toBe(true);
    }
  });

  it('has the objective within the difference of the two quadratures', () => {
    // 9 x 3 nodes here, 15 nodes and Laplace for the cell types there.
    expect(fit.objective).toBeCloseTo(-reference.minus_log_posterior, 2);
  });

  it.each(Object.keys(reference.lifetimes))('has life, fade and range of banks of %s', (scenario) => {
    const expected = reference.lifetimes[scenario]!;
    const life = fit.lifetimes.find((one) => one.scenario === scenario)!;
    expect(withinThreeFigures(life.years.estimate, expected.T80_years)).toBe(true);
    expect(withinThreeFigures(life.efc.estimate, expected.T80_efc)).toBe(true);
    expect(withinThreeFigures(life.fadeAt8y.estimate, expected.fade_at_8y)).toBe(true);
    expect(life.lnT80.se / expected.se_ln_T80).toBeCloseTo(1, 1.7);
    // R's ranges leave out what is unknown of the parameters, so ours do here.
    const range = bankRange(fit.components, life.use, { kind: 'average' }, { isPlugIn: true });
    range.forEach((value, i) =>
      expect(withinThreeFigures(value, expected.range_8of10_years_any_model[i]!)).toBe(true),
    );
    expect(life.rangeOfBanks.lower).toBeLessThan(toThreeFigures(range[0]!));
    expect(life.rangeOfBanks.upper).toBeGreaterThan(toThreeFigures(range[1]!));
  });

  it.each(['typical', 'hard'] as const)('has the life ratio of clamping in the %s use', (scenario) => {
    const expected = reference[`clamp_life_ratio_${scenario}`];
    const effect = fit.effects.find((one) => one.lever === 'clamping' && one.scenario === scenario)!;
    expect(Math.abs(Math.log(effect.lifeRatio) - expected.ln_ratio) / expected.se).toBeLessThan(0.01);
    expect(Math.abs(effect.seLn / expected.se - 1)).toBeLessThan(0.02);
  });

  it('knows the total at the reference well and its split badly, as the covariance of R has it', () => {
    const { estimates, covariance } = reference;
    const logit = estimates.lnB!.estimate - (estimates.lnA!.estimate + 0.5 * Math.log(fit.atReference.years));
    const { seLn, estimate: total } = fit.atReference.totalFade;
    const { seLogit, estimate: share } = fit.atReference.cyclingShare;
    expect(Math.log(share / (1 - share))).toBeCloseTo(logit, 2);
    // At the reference every regressor but the constants is 0: se of lnB - lnA, and of a mean of the two.
    const [a, b, ab] = [covariance[1]![1]!, covariance[4]![4]!, covariance[1]![4]!];
    const expected = Math.exp(estimates.lnB!.estimate) * (1 + Math.exp(-logit));
    expect(Math.abs(total / expected - 1)).toBeLessThan(0.005);
    expect(Math.abs(seLogit / Math.sqrt(a + b - 2 * ab) - 1)).toBeLessThan(0.02);
    const calendar = 1 - share;
    const seTotal = Math.sqrt(calendar ** 2 * a + share ** 2 * b + 2 * calendar * share * ab);
    expect(Math.abs(seLn / seTotal - 1)).toBeLessThan(0.02);
    expect(seLogit).toBeGreaterThan(2 * seLn);
  });

  it('has the effect of every cell type within a tenth of its standard error', () => {
    // R gives the mode of m, here the mean over its nodes.
    for (const row of fit.cellTypes) {
      expect(Math.abs(row.m - reference.model_effects[row.cellType]!) / row.se).toBeLessThan(0.1);
    }
  });
});

describe.each(['pool-outliers-small', 'pool-outliers'])(
  '%s, screening on, against R without the mistakes',
  (name) => {
    const reference = readPoolReference(name);
    const planted = readPlantedOutliers(name);
    const fit = fitFixture(name, true);
    const quarantined = new Set(
      fit.screen.filter(({ action }) => action === 'quarantine').map(({ row }) => row),
    );

    it('finds at least 92 % of the planted mistakes and at most 0.1 % of the others', () => {
      const found = planted.filter((isPlanted, row) => isPlanted && quarantined.has(row)).length;
      const falsely = [...quarantined].filter((row) => !planted[row]).length;
      expect(found / planted.filter(Boolean).length).toBeGreaterThanOrEqual(0.92);
      expect(falsely / planted.length).toBeLessThanOrEqual(0.001);
    });

    it.each(Object.keys(reference.estimates))('has %s within 0.5 SE of the oracle', (parameter) => {
      const { estimate, se } = reference.estimates[parameter]!;
      const row = fit.parameters.find((one) => one.name === parameter)!;
      expect(Math.abs(row.estimate - estimate) / se).toBeLessThan(0.5);
    });

    it('would be far off without the screen', () => {
      const plain = fitFixture(name, false);
      const off = plain.parameters.map(
        (row) =>
          Math.abs(row.estimate - reference.estimates[row.name]!.estimate) /
          reference.estimates[row.name]!.se,
      );
      expect(Math.max(...off)).toBeGreaterThan(1);
    });
  },
);
