import { leastSquares, type LeastSquaresResult } from '@/lib/fit/leastSquares';
import { readReferenceJson } from '../support/reference';
import { nistModels } from '../support/nistModels';

interface NistSet {
  name: string;
  data: number[][];
  response_transform: 'log' | null;
  start1: number[];
  start2: number[];
  degrees_of_freedom: number;
  certified: {
    parameters: number[];
    standard_deviations: number[];
    residual_sum_of_squares: number;
    residual_standard_deviation: number;
  };
}

// Source: NIST/ITL Statistical Reference Datasets, nonlinear regression; certified to 11 digits.
const { sets } = readReferenceJson<{ sets: Record<string, NistSet> }>('nist_nonlinear.json');

function solve(set: NistSet, start: number[]): LeastSquaresResult {
  const model = nistModels[set.name];
  if (!model) throw new Error(`no model of ${set.name}`);
  const observed = set.data.map(([y = NaN]) => (set.response_transform === 'log' ? Math.log(y) : y));
  const predictors = set.data.map((row) => row.slice(1));
  return leastSquares({ observed, model: (b) => (i) => model(b, predictors[i] as number[]) }, { start });
}

const worst = (found: readonly number[], certified: readonly number[]) =>
  Math.max(...certified.map((value, j) => Math.abs((found[j] as number) / value - 1)));

// Tolerances: relative, parameters 1e-8 from start 2 and 1e-6 from start 1, standard deviations 1e-6.
// Lanczos1 has residuals of 1e-13 on observations near 1, where double precision leaves them 3 digits.
const sdTolerance = (name: string) => (name === 'Lanczos1' ? 5e-3 : 1e-6);

describe('leastSquares against NIST StRD', () => {
  it('has a model for each of the 18 sets', () => {
    expect(Object.keys(nistModels).sort()).toEqual(Object.keys(sets).sort());
  });

  it.each(Object.values(sets).map((set) => [set.name, set] as const))('%s from start 2', (name, set) => {
    const found = solve(set, set.start2);
    if (!found.ok) throw new Error(found.reason);
    expect(worst(found.parameters, set.certified.parameters)).toBeLessThan(1e-8);
    expect(worst(found.standardErrors, set.certified.standard_deviations)).toBeLessThan(sdTolerance(name));
    expect(worst([found.residualSd], [set.certified.residual_standard_deviation])).toBeLessThan(
      sdTolerance(name),
    );
    expect(found.degreesOfFreedom).toBe(set.degrees_of_freedom);
  });

  const reached = Object.values(sets).filter(({ name }) => name !== 'MGH10');
  it.each(reached.map((set) => [set.name, set] as const))('%s from start 1', (name, set) => {
    const found = solve(set, set.start1);
    if (!found.ok) throw new Error(found.reason);
    expect(worst(found.parameters, set.certified.parameters)).toBeLessThan(1e-6);
    expect(worst(found.standardErrors, set.certified.standard_deviations)).toBeLessThan(sdTolerance(name));
  });

  it('says that it did not converge from start 1 of MGH10, rather than give a wrong answer', () => {
    expect(solve(sets.MGH10 as NistSet, (sets.MGH10 as NistSet).start1)).toEqual({
      ok: false,
      reason: 'notConverged',
    });
  });
});
