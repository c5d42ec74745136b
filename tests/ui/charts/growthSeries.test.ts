import {
  growthDomain,
  growthParts,
  growthReading,
  growthReadings,
  growthSummary,
  spreadLabels,
} from '@/components/charts/growthSeries';

const band = (x: number, status: 'measured' | 'projected' = 'measured') => ({
  x,
  status,
  quantiles: [0.86, 0.89, 0.91, 0.93, 0.95],
});
const check = { id: 'a', x: 2, soh: 0.93, plusMinus: 0.01, when: '2 Nov 2026' };

describe('growthDomain', () => {
  it('always shows 80 %, and all that is drawn', () => {
    const { x, y } = growthDomain([{ ...check, soh: 1.03 }], [band(1), band(8)]);
    expect(x).toEqual([0, 8]);
    expect(y[0]).toBeLessThan(0.8);
    expect(y[1]).toBeGreaterThan(1.04);
  });
});

describe('growthParts', () => {
  it('joins where the standing changes', () => {
    const parts = growthParts([band(1), band(2), band(3, 'projected'), band(4, 'projected')]);
    expect(parts.map(({ status, points }) => [status, points.map(({ x }) => x)])).toEqual([
      ['measured', [1, 2]],
      ['projected', [2, 3, 4]],
    ]);
  });
});

describe('readings', () => {
  it('say half and 8 of 10 banks, with their standing', () => {
    expect(growthReading(band(6, 'projected'), 'years').replaceAll('\u202f', ' ')).toBe(
      'At 6.0 y: half of banks above 91 %, 8 of 10 within 86–95 %, projected',
    );
  });

  it('run from left to right through checks and lines', () => {
    expect(growthReadings([check], [band(1), band(3)], 'years').map(({ x }) => x)).toEqual([1, 2, 3]);
  });

  it('are summed up with every check', () => {
    const words = growthSummary('Checks', { checks: [check], bands: [band(1), band(3)], unit: 'years' });
    expect(words).toContain('2 Nov 2026');
    expect(words).toContain('At 3.0 y');
  });
});

describe('spreadLabels', () => {
  it('keeps the order and leaves the gap', () => {
    const spread = spreadLabels([100, 98, 97, 60, 96], 14);
    const sorted = [...spread].sort((a, b) => a - b);
    sorted.slice(1).forEach((height, i) => expect(height - sorted[i]!).toBeGreaterThanOrEqual(14));
    expect(spread[0]).toBeGreaterThan(spread[1]!);
    expect(spread[3]).toBe(Math.min(...spread));
  });
});
