import { fadeAt, fadeDomain, fadeParts, thinChecks, type FadePoint } from '@/components/charts/fadeSeries';
import { fadeReading, fadeSummary, lifeLabel } from '@/components/charts/fadeWords';

const point = (x: number, soh: number, status: FadePoint['status']): FadePoint => ({
  x,
  soh,
  lower: soh - 0.02,
  upper: soh + 0.02,
  status,
});

const curve = [
  point(0, 1, 'measured'),
  point(4, 0.9, 'measured'),
  point(8, 0.86, 'projected'),
  point(12, 0.8, 'projected'),
  point(16, 0.76, 'extrapolated'),
];

describe('fadeParts', () => {
  it('cuts the curve at each change of standing and lets the parts meet', () => {
    const parts = fadeParts(curve);
    expect(parts.map((part) => [part.status, part.points.map((one) => one.x)])).toEqual([
      ['measured', [0, 4]],
      ['projected', [4, 8, 12]],
      ['extrapolated', [12, 16]],
    ]);
  });

  it('has no part of a single point, which no line could be drawn through', () => {
    expect(fadeParts([point(0, 1, 'measured')])).toEqual([]);
  });
});

describe('thinChecks', () => {
  it('leaves few checks as they are', () => {
    const checks = [
      { x: 2, soh: 0.9 },
      { x: 1, soh: 0.95 },
    ];
    expect(thinChecks(checks, 2)).toBe(checks);
  });

  it('keeps the share of each year when there are too many', () => {
    const early = Array.from({ length: 3000 }, (_, index) => ({ x: index / 3000, soh: 0.98 }));
    const late = Array.from({ length: 1000 }, (_, index) => ({ x: 5 + index / 1000, soh: 0.9 }));
    const kept = thinChecks([...late, ...early], 1500);
    expect(kept).toHaveLength(1500);
    const lateShare = kept.filter((check) => check.x >= 5).length / kept.length;
    expect(lateShare).toBeCloseTo(0.25, 2);
    expect(new Set(kept).size).toBe(1500);
  });
});

describe('fadeDomain', () => {
  it('begins at 0 and at 70 % when nothing lies lower', () => {
    const domain = fadeDomain([{ x: 5, soh: 0.88 }], curve, [], undefined);
    expect(domain.x).toEqual([0, 16]);
    expect(domain.y[0]).toBe(0.7);
    expect(domain.y[1]).toBeGreaterThan(1);
  });

  it('goes down to the tens below the lowest reading', () => {
    expect(fadeDomain([{ x: 5, soh: 0.43 }], curve, [], undefined).y[0]).toBe(0.4);
  });

  it('includes a claim nearby and does not stretch for one far away', () => {
    expect(fadeDomain([], curve, [{ x: 18, label: 'label' }], undefined).x[1]).toBeGreaterThanOrEqual(18);
    expect(fadeDomain([], curve, [{ x: 60, label: 'label' }], undefined).x[1]).toBeLessThan(26);
  });

  it('is a usable domain when there is nothing at all', () => {
    const { x, y } = fadeDomain([], [], [], undefined);
    expect(x[1]).toBeGreaterThan(x[0]);
    expect(y[1]).toBeGreaterThan(y[0]);
  });
});

describe('fadeAt', () => {
  it('reads straight between two points', () => {
    expect(fadeAt(curve, 2)).toMatchObject({ x: 2, status: 'measured' });
    expect(fadeAt(curve, 2)?.soh).toBeCloseTo(0.95, 12);
    expect(fadeAt(curve, 6)?.soh).toBeCloseTo(0.88, 12);
  });

  it('reads the ends and nothing outside', () => {
    expect(fadeAt(curve, 0)?.soh).toBe(1);
    expect(fadeAt(curve, 16)?.soh).toBeCloseTo(0.76, 12);
    expect(fadeAt(curve, 16.1)).toBeUndefined();
    expect(fadeAt(curve, -0.1)).toBeUndefined();
    expect(fadeAt([], 1)).toBeUndefined();
  });
});

describe('the words of the chart', () => {
  const spaces = /[\u00a0\u202f\u2009]/g;
  const plain = (text: string) => text.replace(spaces, ' ');

  it('give an extrapolated point as a range only', () => {
    expect(plain(fadeReading(point(16, 0.76, 'extrapolated'), 'years'))).toBe(
      'At 16 y: 74–78 % left, extrapolated',
    );
    expect(plain(fadeReading(point(4, 0.9, 'measured'), 'years'))).toBe(
      'At 4.0 y: 90 % left, range 88–92 %, measured',
    );
  });

  it('label a life by its standing, and an extrapolated one by its range', () => {
    const life = { estimate: 13.1, lower: 11.2, upper: 15.1, status: 'projected' as const };
    expect(plain(lifeLabel(life, 'years'))).toBe('13 y to 80 %, projected');
    expect(plain(lifeLabel({ ...life, status: 'extrapolated' }, 'years'))).toBe(
      '11–15 y to 80 %, extrapolated',
    );
  });

  it('say the number of checks, the reach, the life with its range, and the label', () => {
    const summary = plain(
      fadeSummary({
        title: 'Capacity left',
        curve,
        checkCount: 1248,
        reachX: 7.4,
        life: { estimate: 12, lower: 11, upper: 14, status: 'projected' },
        claims: [{ x: 15.5, label: 'the label' }],
        unit: 'years',
      }),
    );
    for (const part of [
      '1,248 single checks',
      'reach 7.4 y',
      'falls to 80 % at 12 y, projected',
      '11–14 y',
      'By the label it would be at 16 y',
    ])
      expect(summary).toContain(part);
  });

  it('say that no figure is given where there is none', () => {
    const summary = fadeSummary({
      title: 'Capacity left',
      curve: [],
      checkCount: 0,
      reachX: null,
      life: null,
      claims: [],
      unit: 'efc',
    });
    expect(plain(summary)).toContain('No figure is given for the fall to 80 %');
  });
});
