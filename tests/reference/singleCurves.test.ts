import { readFileSync } from 'node:fs';
import { fitSeries, type SeriesFit, type SeriesPoint } from '@/lib/fit';
import { readReferenceJson, referencePath } from '../support/reference';

interface ReferenceSeries {
  points: number;
  k: number;
  z: number;
  se_k: number;
  se_z: number;
  corr: number;
  sigma: number;
  df: number;
  efc_to_80: number;
  se_ln_efc_to_80: number;
  ci90_efc_to_80_t: [number, number];
  last_efc: number;
}

// Source: R 4.2.2 nls, unweighted; files fit/single-curves of the reference values. Printed to 8 decimals.
const { series } = readReferenceJson<{ series: Record<string, ReferenceSeries> }>(
  'fit/single-curves/reference.json',
);

function pointsOf(name: string): SeriesPoint[] {
  return readFileSync(referencePath('fit/single-curves/curves.csv'), 'utf8')
    .trim()
    .split('\n')
    .map((line) => line.split(','))
    .filter(([key]) => key === name)
    .map(([, efc, soh]) => ({ efc: Number(efc), capacityFraction: Number(soh) }));
}

function fitted(points: SeriesPoint[], confidence?: number): SeriesFit {
  const fit = fitSeries(points, confidence);
  if (!fit.ok) throw new Error(fit.reason);
  return fit;
}

const relative = (found: number, expected: number) => Math.abs(found / expected - 1);

describe('fitSeries against R nls', () => {
  it.each(Object.entries(series))('%s', (name, expected) => {
    const points = pointsOf(name);
    expect(points).toHaveLength(expected.points);
    const fit = fitted(points);
    expect(Math.abs(fit.z.estimate - expected.z)).toBeLessThan(2e-7);
    // R's k is at 1 EFC: k500 = k 500^z; k has 8 decimals, so 1e-8 / k of relative error and z's times ln 500.
    const tolerance = 1e-8 / expected.k + 2e-7 * Math.log(500);
    expect(relative(fit.k.estimate, expected.k * 500 ** expected.z)).toBeLessThan(tolerance);
    expect(relative(fit.efcTo80.estimate, expected.efc_to_80)).toBeLessThan(1e-6);
    expect(relative(fit.seLnEfcTo80, expected.se_ln_efc_to_80)).toBeLessThan(1e-5);
    expect(relative(fit.efcTo80.lower, expected.ci90_efc_to_80_t[0])).toBeLessThan(1e-5);
    expect(relative(fit.efcTo80.upper, expected.ci90_efc_to_80_t[1])).toBeLessThan(1e-5);
    expect(relative(fit.residualSd, expected.sigma)).toBeLessThan(1e-5);
    expect(relative(Math.sqrt(fit.covariance[1]?.[1] as number), expected.se_z)).toBeLessThan(1e-5);
    expect(fit.degreesOfFreedom).toBe(expected.df);
    expect(fit.lastEfc).toBe(expected.last_efc);
  });

  it('marks the life of S4 as beyond its reach and those of S2, S3 and S5 by how far they go', () => {
    // Extrapolated 5.9, 1.9, 1.7, 11.8 and 2.9 times (extrapolation_factor of the reference).
    const statuses = ['S1', 'S2', 'S3', 'S4', 'S5'].map((name) => fitted(pointsOf(name)).status);
    expect(statuses).toEqual(['beyond', 'projected', 'projected', 'beyond', 'extrapolated']);
  });
});

interface InversePrediction {
  power_law: {
    t: number[];
    y: number[];
    coef: { k: number; z: number };
    se: { z: number };
    t80: number;
    se_log_t80: number;
    delta_log_ci95: [number, number];
  };
}

describe('fitSeries against inverse prediction in R', () => {
  it('finds the time to 80 % and its 95 % interval', () => {
    // Source: inverse_prediction.json, R nls with the delta method on ln t80. Time in hundredths stands for EFC.
    const { power_law: expected } = readReferenceJson<InversePrediction>('inverse_prediction.json');
    const points = expected.t.map((t, i) => ({
      efc: 100 * t,
      capacityFraction: (expected.y[i] as number) / 100,
    }));
    const fit = fitted(points, 0.95);
    expect(relative(fit.efcTo80.estimate / 100, expected.t80)).toBeLessThan(1e-6);
    expect(relative(fit.k.estimate, expected.coef.k * 5 ** expected.coef.z)).toBeLessThan(1e-6);
    expect(relative(fit.z.estimate, expected.coef.z)).toBeLessThan(1e-6);
    expect(relative(fit.seLnEfcTo80, expected.se_log_t80)).toBeLessThan(1e-5);
    expect(relative(fit.efcTo80.lower / 100, expected.delta_log_ci95[0])).toBeLessThan(1e-5);
    expect(relative(fit.efcTo80.upper / 100, expected.delta_log_ci95[1])).toBeLessThan(1e-5);
  });
});
