import { binDomain, type BinPoint, binReading, binWords, placeBins } from '@/components/charts/binSeries';

const bin = (from: number | null, to: number | null, change: Partial<BinPoint> = {}): BinPoint => ({
  ...{ from, to, median: 0.001, lower: -0.012, upper: 0.014, model: null, owners: 240, checks: 1312 },
  ...change,
});

describe('placeBins', () => {
  test('stands in the middle of closed bins, and half a usual width into open ones', () => {
    const placed = placeBins([bin(null, 2), bin(2, 4), bin(4, 6), bin(6, null)]);
    expect(placed.map(({ x }) => x)).toEqual([1, 3, 5, 7]);
  });

  test('keeps an open first bin above 0', () => {
    expect(placeBins([bin(null, 1), bin(1, 11)])[0]!.x).toBe(0.5);
  });
});

describe('binDomain', () => {
  const series = [{ label: 'checks', mark: 'circle' as const, points: [bin(1, 2), bin(2, 3)] }];

  test('holds every mark, and a level asked for', () => {
    const { x, y } = binDomain(series, 0.05);
    expect(x[0]).toBeLessThanOrEqual(1);
    expect(x[1]).toBeGreaterThanOrEqual(3);
    expect(y[0]).toBeLessThanOrEqual(-0.012);
    expect(y[1]).toBeGreaterThanOrEqual(0.05);
  });

  test('is of finite width for one bin of one value, and for none', () => {
    const flat = bin(2, 2, { median: 0, lower: 0, upper: 0 });
    for (const points of [[flat], []]) {
      const { x, y } = binDomain([{ label: 'checks', mark: 'circle', points }]);
      expect(x[1] - x[0]).toBeGreaterThan(0);
      expect(y[1] - y[0]).toBeGreaterThan(0);
    }
  });

  test('holds the model where it lies outside the readings', () => {
    const points = [bin(1, 2, { model: 0.2 })];
    expect(binDomain([{ label: 'checks', mark: 'circle', points }]).y[1]).toBeGreaterThanOrEqual(0.2);
  });
});

describe('words of a bin', () => {
  test('name its ends, open or closed', () => {
    const format = (x: number) => x.toFixed(0);
    expect(binWords({ from: 1, to: 2 }, format)).toBe('1 to 2');
    expect(binWords({ from: null, to: 2 }, format)).toBe('below 2');
    expect(binWords({ from: 7, to: null }, format)).toBe('from 7');
    expect(binWords({ from: null, to: null }, format)).toBe('all');
  });

  test('give median, middle 80 % and who stands behind them', () => {
    expect(binReading(bin(1, 2), { formatX: String, unitX: 'years' })).toMatch(
      /^1 to 2 years: median 0\.1 %, middle 80 % −1\.2 to 1\.4 %; 1,312 checks of 240 owners$/,
    );
  });
});
