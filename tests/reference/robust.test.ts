import { quantile, median } from 'simple-statistics';
import { linearLeastSquares } from '@/lib/fit/linearLeastSquares';
import { influenceOf } from '@/lib/fit/robust/influence';
import { madScale } from '@/lib/fit/robust/madScale';
import { theilSen } from '@/lib/fit/robust/theilSen';
import { readReferenceJson } from '../support/reference';

interface Sample {
  data: number[];
  median: number;
  'mad_1.4826': number;
  quantiles_type7: Record<string, number>;
}

interface Diagnostics {
  cooks_distance: number[];
  hat: number[];
  rstudent: number[];
  rstandard?: number[];
  dffits?: number[];
}

interface Regression {
  data: Record<string, number[]>;
  ols: { coef: Record<string, number>; se: Record<string, number>; sigma: number };
  diagnostics: Diagnostics;
}

interface TheilSenReference {
  slope: number;
  intercept_median_residual: number;
  n_pairs: number;
  ci95_rounded: [number, number];
}

// Source: R 4.2.2 (MASS, datasets) and scipy for Theil-Sen; robust.json of the reference values.
const reference = readReferenceJson<{
  chem: Sample;
  abbey: Sample;
  stackloss: Regression;
  phones: Regression;
  anscombe3: Diagnostics & { x: number[]; y: number[]; ols: Regression['ols']; theil_sen: TheilSenReference };
  theil_sen: {
    phones: TheilSenReference;
    stackloss_airflow: TheilSenReference;
    cloud_seeding: TheilSenReference & { x: number[]; y: number[] };
    cars: TheilSenReference & { x: number[]; y: number[] };
  };
}>('robust.json');

// R prints 15 digits; what is allowed is rounding of sums of some tens of terms.
const near = (found: number, expected: number, tolerance = 1e-10) =>
  expect(Math.abs(found - expected)).toBeLessThan(tolerance * Math.max(Math.abs(expected), 1e-3));

const column = (regression: Regression, name: string) => regression.data[name] as number[];

describe('median, MAD and quantiles against R', () => {
  it.each(['chem', 'abbey'] as const)('%s', (name) => {
    const sample = reference[name];
    near(median(sample.data), sample.median);
    near(madScale(sample.data), sample['mad_1.4826']);
    for (const [percent, value] of Object.entries(sample.quantiles_type7)) {
      near(quantile(sample.data, parseFloat(percent) / 100), value);
    }
  });

  it('refuses no values', () => {
    expect(() => madScale([])).toThrow(RangeError);
  });
});

describe('theilSen against Kendall intervals in R and scipy', () => {
  const cases: [string, number[], number[], TheilSenReference][] = [
    [
      'phones',
      column(reference.phones, 'year'),
      column(reference.phones, 'calls'),
      reference.theil_sen.phones,
    ],
    [
      'stack loss on air flow',
      column(reference.stackloss, 'Air.Flow'),
      column(reference.stackloss, 'stack.loss'),
      reference.theil_sen.stackloss_airflow,
    ],
    [
      'cloud seeding',
      reference.theil_sen.cloud_seeding.x,
      reference.theil_sen.cloud_seeding.y,
      reference.theil_sen.cloud_seeding,
    ],
    ['cars', reference.theil_sen.cars.x, reference.theil_sen.cars.y, reference.theil_sen.cars],
    ['Anscombe 3', reference.anscombe3.x, reference.anscombe3.y, reference.anscombe3.theil_sen],
  ];

  it.each(cases)('%s', (_name, x, y, expected) => {
    const line = theilSen(x, y, 0.95);
    if (!line.ok) throw new Error(line.reason);
    near(line.slope, expected.slope);
    near(line.intercept, expected.intercept_median_residual);
    expect(line.pairs).toBe(expected.n_pairs);
    near(line.slopeLower, expected.ci95_rounded[0]);
    near(line.slopeUpper, expected.ci95_rounded[1]);
  });

  it('refuses a single x and mistakes of the caller', () => {
    expect(theilSen([2, 2], [1, 3])).toEqual({ ok: false, reason: 'oneX' });
    expect(() => theilSen([1], [1, 2])).toThrow(RangeError);
    expect(() => theilSen([1, NaN], [1, 2])).toThrow(RangeError);
    expect(() => theilSen([1, 2], [1, 2], 1)).toThrow(RangeError);
  });
});

describe('influenceOf against R', () => {
  const stackloss = reference.stackloss;
  const predictors = ['Air.Flow', 'Water.Temp', 'Acid.Conc.'].map((name) => column(stackloss, name));
  const cases: [string, number[][], number[], Regression['ols'], Diagnostics][] = [
    [
      'stackloss',
      column(stackloss, 'stack.loss').map((_, i) => [1, ...predictors.map((values) => values[i] as number)]),
      column(stackloss, 'stack.loss'),
      stackloss.ols,
      stackloss.diagnostics,
    ],
    [
      'phones',
      column(reference.phones, 'year').map((year) => [1, year]),
      column(reference.phones, 'calls'),
      reference.phones.ols,
      reference.phones.diagnostics,
    ],
    [
      'Anscombe 3',
      reference.anscombe3.x.map((x) => [1, x]),
      reference.anscombe3.y,
      reference.anscombe3.ols,
      reference.anscombe3,
    ],
  ];

  it.each(cases)('%s', (_name, design, observed, ols, diagnostics) => {
    const fit = linearLeastSquares(design, observed);
    if (!fit.ok) throw new Error(fit.reason);
    Object.values(ols.coef).forEach((value, j) => near(fit.coefficients[j] as number, value, 1e-9));
    Object.values(ols.se).forEach((value, j) => near(fit.standardErrors[j] as number, value, 1e-9));
    near(fit.residualSd, ols.sigma);
    influenceOf(fit).forEach((found, i) => {
      near(found.leverage, diagnostics.hat[i] as number, 1e-9);
      near(found.cook, diagnostics.cooks_distance[i] as number, 1e-8);
      // Anscombe's third point has a deleted scatter of nearly nothing: 1e-6 there.
      near(found.studentised, diagnostics.rstudent[i] as number, 1e-6);
      if (diagnostics.rstandard) near(found.standardised, diagnostics.rstandard[i] as number, 1e-9);
      if (diagnostics.dffits) near(found.dffits, diagnostics.dffits[i] as number, 1e-8);
    });
  });
});
