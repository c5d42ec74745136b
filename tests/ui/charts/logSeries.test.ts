import { paddedDomain, runsOf, thinRun, timeUnitOf } from '@/components/charts/logSeries';

describe('runsOf', () => {
  it('cuts where a reading is missing', () => {
    const runs = runsOf([0, 1, 2, 3, 4], [3, null, 5, NaN, 7]);
    expect(runs.map((run) => run.map((one) => one.timeS))).toEqual([[0], [2], [4]]);
  });

  it('has no runs without readings', () => {
    expect(runsOf([0, 1], [null, null])).toEqual([]);
  });
});

describe('thinRun', () => {
  const run = Array.from({ length: 20_000 }, (_, index) => ({
    timeS: index,
    value: index === 12_345 ? 40 : 53 + Math.sin(index / 50),
  }));

  it('keeps both ends and a dip of a single reading', () => {
    const thin = thinRun(run, 800);
    expect(thin.length).toBeLessThanOrEqual(804);
    expect(thin[0]).toBe(run[0]);
    expect(thin.at(-1)).toBe(run.at(-1));
    expect(thin).toContain(run[12_345]);
  });

  it('stays in order of time without repeats', () => {
    const times = thinRun(run, 800).map((one) => one.timeS);
    expect(times.every((time, index) => index === 0 || time > (times[index - 1] ?? -1))).toBe(true);
  });

  it('leaves short runs alone', () => {
    expect(thinRun(run.slice(0, 5), 8)).toHaveLength(5);
  });
});

describe('paddedDomain', () => {
  it('leaves room around voltages and holds currents to 0', () => {
    const [low, high] = paddedDomain([45, null, 54], false);
    expect(low).toBeLessThan(45);
    expect(high).toBeGreaterThan(54);
    expect(paddedDomain([10, 48], true)[0]).toBe(0);
    expect(paddedDomain([-48, -10], true)[1]).toBe(0);
  });

  it('has a width even when all values are the same, or none is there', () => {
    for (const values of [[3, 3], [0], [], [null]]) {
      const [low, high] = paddedDomain(values, false);
      expect(high).toBeGreaterThan(low);
    }
  });
});

it.each([
  [4.7 * 3600, 'h'],
  [90 * 60, 'min'],
  [50, 's'],
])('a log of %p s is read in %s', (span, unit) => {
  expect(timeUnitOf(span).unit).toBe(unit);
});
