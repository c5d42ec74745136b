import {
  lifeFigure,
  lifeSummary,
  outsideSentence,
  reachWords,
  sourceSentence,
  standingWords,
  toldOf,
} from '@/components/cells/lifeWords';
import type { Life } from '@/lib/contract/cells';

const life = (change: Partial<Life> = {}): Life => ({
  status: 'projected',
  years: { estimate: 13.3, lower: 12.2, upper: 14.6 },
  efc: { estimate: 2916, lower: 2666, upper: 3190 },
  rangeOfBanks: { lower: 8.05, upper: 21.9 },
  rangeOfBanksEfc: { lower: 1765, upper: 4792 },
  leftAtReachFraction: { estimate: 0.866, lower: 0.858, upper: 0.873 },
  reachYears: 7.01,
  reachEfc: 1536,
  basis: 'cellType',
  priorShareFraction: 0.06,
  support: 'shown',
  ownShareFraction: 0.93,
  outside: [],
  ...change,
});
const hot: Life['outside'][number] = { condition: 'temperatureC', value: 45, nearest: 35.06 };

describe('what a page says of a life', () => {
  test.each([
    ['measured', 'figure'],
    ['projected', 'figure'],
    ['extrapolated', 'range'],
    ['beyond', 'beyond'],
  ] as const)('%s is told as %s', (status, told) => {
    expect(toldOf(life({ status }))).toBe(told);
  });

  test('is no number while more than half comes from published studies, or outside the pool', () => {
    expect(toldOf(life({ support: 'notMeasured' }))).toBe('notMeasured');
    expect(toldOf(life({ outside: [hot] }))).toBe('outside');
    const untold: Partial<Life>[] = [{ support: 'notMeasured' }, { outside: [hot] }, { status: 'beyond' }];
    for (const change of untold) {
      expect(lifeFigure(life(change))).toEqual({ value: '–', range: '' });
      expect(lifeSummary(life(change), undefined)).not.toMatch(/\d/);
    }
  });

  test('gives estimate and range, or the range alone when extrapolated', () => {
    expect(lifeFigure(life()).value).toBe('13');
    expect(lifeFigure(life()).range).toMatch(/^12.15$/);
    expect(lifeFigure(life({ status: 'extrapolated' }))).toEqual({
      value: expect.stringMatching(/^12.15$/),
      range: '',
    });
  });

  test('names where it stands', () => {
    expect(standingWords(life({ status: 'measured' }))).toBe('measured');
    expect(standingWords(life({ status: 'beyond' }))).toBe('beyond the readings');
    expect(standingWords(life({ outside: [hot] }))).toBe('outside the pool');
    expect(standingWords(life({ support: 'notMeasured' }))).toBe('not measured yet');
  });

  test('says whose figure it is', () => {
    const evidence = { owners: 6, banks: 6, checks: 24 };
    expect(reachWords({ ...evidence, banks: 38 }, life())).toMatch(/^38 banks, read to 7\.0.y: 87.% left$/);
    expect(reachWords(evidence, life({ basis: 'pool' }))).toBe('6 banks, fewer than 10: the pool’s figure');
    expect(reachWords(null, life({ basis: 'pool' }))).toBe('too few owners yet: the pool’s figure');
    expect(lifeSummary(life({ basis: 'pool' }), undefined)).toContain('over all cell types');
  });

  test('says how much the pool and how much published studies say', () => {
    expect(sourceSentence(life())).toMatch(/^94 % of this comes from the pool, 6 % from published studies\./);
    expect(sourceSentence(life({ support: 'leans', priorShareFraction: 0.3 }))).toContain(
      'leans on published studies',
    );
    expect(sourceSentence(life({ priorShareFraction: null }))).toBeNull();
  });

  test('names the condition outside the pool and the nearest value within', () => {
    expect(outsideSentence([hot])).toMatch(
      /^The pool does not reach there: .*45.°C \(the nearest it supports is 35.°C\)/,
    );
  });
});
