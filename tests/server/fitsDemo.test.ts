import { cellTypeOf } from '@/data/demo/cellTypes';
import { demoSeed, generateDemo } from '@/data/demo/generateDemo';
import { scenarios, trueYearsTo80 } from '@/data/demo/truth';
import { standardUse } from '@/lib/contract/cells';
import { averageFigure, type PublishedFit } from '@/lib/fit';
import { dataHashOf } from '@/server/fits/describeRows';
import type { FitOutput } from '@/server/fits/fitOutput';
import { runFitTask } from '@/server/fits/fitTask';
import { demoPool } from '@/server/seed/demoPool';

jest.setTimeout(120_000);

let output: FitOutput;
let model: PublishedFit;

beforeAll(() => {
  const rows = demoPool(generateDemo(demoSeed).banks);
  const outcome = runFitTask({ kind: 'working', rows, dataHash: dataHashOf(rows), previous: null });
  if (!outcome.ok) throw new Error(outcome.reason);
  output = outcome.output;
  model = output.model;
});

describe('the demo as fitted', () => {
  it('has lives of all four statuses at the standard use', () => {
    const statuses = new Set(output.figures.map(({ life }) => life.status));
    expect([...statuses].sort()).toEqual(['beyond', 'extrapolated', 'measured', 'projected']);
  });

  it('covers the truth by the range of the average cell type', () => {
    const { years } = averageFigure(model, standardUse);
    const truth = trueYearsTo80(scenarios.standard);
    expect(years.lower).toBeLessThan(truth);
    expect(years.upper).toBeGreaterThan(truth);
  });

  it('covers the truth of most cell types, and ranks the best and the worst', () => {
    const lives = output.figures.map(({ cellType, life }) => ({
      ...life,
      truth: trueYearsTo80(scenarios.standard, cellTypeOf(cellType).effect),
    }));
    const covered = lives.filter(({ years, truth }) => years.lower < truth && truth < years.upper);
    // 90 % ranges over some twenty cell types that share one curve: three quarters leaves room for chance.
    expect(covered.length / lives.length).toBeGreaterThan(0.75);
    const best = (of: (life: (typeof lives)[number]) => number) =>
      lives.reduce((a, b) => (of(b) > of(a) ? b : a));
    expect(best(({ years }) => years.estimate)).toBe(best(({ truth }) => truth));
  });

  it('finds heat, and clamping above 0.3 It, but no clamping worth a word at home rates', () => {
    const verdictOf = (lever: string) => output.effects.find((effect) => effect.lever === lever)!;
    expect(verdictOf('heat')).toMatchObject({ verdict: 'shown', isAtLeast: true });
    expect(verdictOf('clampingHighRate')).toMatchObject({ verdict: 'shown' });
    expect(['couldBeNone', 'tooSmall']).toContain(verdictOf('clampingLowRate').verdict);
  });

  it('predicts single checks as often as its ranges say', () => {
    const { within } = output.coverage;
    // Heavy tails and guessed conditions: a few points off the nominal share.
    within.forEach(({ level, shareFraction }) => expect(Math.abs(shareFraction - level)).toBeLessThan(0.06));
  });
});
