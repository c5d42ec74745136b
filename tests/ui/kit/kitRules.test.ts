import { placeOf, type Place } from '@/components/shell/places';
import { positionOn } from '@/components/ui/gaugeScale';
import { sortedRows } from '@/components/ui/sortRows';

describe('sortedRows', () => {
  const rows = [{ v: 3 }, { v: null }, { v: 1 }, { v: 2 }, { v: NaN }];
  const value = (row: { v: number | null }) => row.v;

  it('puts missing values last in both directions', () => {
    expect(sortedRows(rows, value, false).map((row) => row.v)).toEqual([1, 2, 3, null, NaN]);
    expect(sortedRows(rows, value, true).map((row) => row.v)).toEqual([3, 2, 1, null, NaN]);
  });

  it('sorts names with numbers in them as people do', () => {
    const names = ['Skerry 240', 'Skerry 50', 'Corrie C50'].map((name) => ({ name }));
    expect(sortedRows(names, (row) => row.name, false).map((row) => row.name)).toEqual([
      'Corrie C50',
      'Skerry 50',
      'Skerry 240',
    ]);
  });

  it('leaves rows as they stand without a column to sort by', () => {
    expect(sortedRows(rows, undefined, true)).toBe(rows);
  });
});

describe('positionOn', () => {
  it('puts half and twice equally far from 1 on a scale of ratios', () => {
    const scale = { min: 0.25, max: 4, isLog: true };
    expect(positionOn(scale, 1)).toBeCloseTo(0.5, 12);
    expect(positionOn(scale, 2) - 0.5).toBeCloseTo(0.5 - positionOn(scale, 0.5), 12);
  });

  it('holds what lies beyond at the ends', () => {
    expect(positionOn({ min: 0, max: 20 }, 31)).toBe(1);
    expect(positionOn({ min: 0, max: 20 }, -1)).toBe(0);
  });
});

describe('placeOf', () => {
  const places: Place[] = [
    { href: '/', label: 'Lifetimes', icon: 'lifetimes', under: ['/cells'] },
    { href: '/banks', label: 'My banks', icon: 'banks' },
  ];
  const label = (pathname: string) => placeOf(places, pathname)?.label;

  it.each([
    ['/', 'Lifetimes'],
    ['/cells/skerry-240', 'Lifetimes'],
    ['/banks', 'My banks'],
    ['/banks/1/check', 'My banks'],
    ['/bankside', undefined],
    ['/sign-in', undefined],
  ])('%s belongs to %s', (pathname, expected) => {
    expect(label(pathname)).toBe(expected);
  });
});
