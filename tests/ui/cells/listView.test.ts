import { deliveredPrice } from '@/components/cells/deliveredPrice';
import { arranged, isDescending, listViewQuery, readListView } from '@/components/cells/listView';
import { survivalSentence } from '@/components/cells/survivalWords';
import type { CellEntry, Life } from '@/lib/contract/cells';
import { formatSmallMoney } from '@/lib/units';

const life = (years: number, change: Partial<Life> = {}): Life => ({
  ...{ status: 'projected', basis: 'cellType', support: 'shown', outside: [] },
  years: { estimate: years, lower: years - 1, upper: years + 1 },
  efc: { estimate: years * 200, lower: (years - 1) * 200, upper: (years + 1) * 200 },
  ...{ rangeOfBanks: null, rangeOfBanksEfc: null, reachYears: 7, reachEfc: 1400 },
  ...{ leftAtReachFraction: { estimate: 0.87, lower: 0.86, upper: 0.88 } },
  ...{ priorShareFraction: 0.05, ownShareFraction: 0.9 },
  ...change,
});
const entry = (name: string, of: Life | null, change: Partial<CellEntry> = {}): CellEntry => ({
  cellType: { id: name, maker: 'Halmund', name, ratedAh: 100, nominalV: 3.2, format: 'prismatic' },
  ...{ price: null, evidence: { owners: 30, banks: 31, checks: 90 }, life: of, absence: null, claims: [] },
  ...change,
});
const names = (cells: readonly CellEntry[]) => cells.map(({ cellType }) => cellType.name);
const view = readListView({});

describe('the list as it is looked at', () => {
  const cells = [
    entry('Short', life(9)),
    entry('Pooled', life(30, { basis: 'pool' })),
    entry('Long', life(14)),
    entry('None', null),
  ];

  test('has the longest life first, those without one of their own last', () => {
    expect(names(arranged(cells, view))).toEqual(['Long', 'Short', 'None', 'Pooled']);
    expect(names(arranged(cells, { ...view, turned: 'yes' }))).toEqual(['Short', 'Long', 'None', 'Pooled']);
  });

  test('finds by name, maker and capacity, whatever the case', () => {
    expect(names(arranged(cells, { ...view, find: ' lon ' }))).toEqual(['Long']);
    expect(arranged(cells, { ...view, find: 'halmund 100' })).toHaveLength(4);
    expect(arranged(cells, { ...view, find: 'halmund 99' })).toEqual([]);
    expect(arranged(cells, { ...view, find: '100 AH' })).toHaveLength(4);
    expect(names(arranged(cells, { ...view, own: 'yes', sort: 'name' }))).toEqual(['Long', 'Short']);
    expect(arranged(cells, { ...view, form: 'pouch' })).toEqual([]);
  });

  test('is read back from its address, and from a silly one as it is by default', () => {
    const asked = { sort: 'price', turned: 'yes', find: 'sker', form: 'pouch', own: 'yes' } as const;
    expect(readListView(listViewQuery(asked))).toEqual(asked);
    expect(Object.values(listViewQuery(view)).filter(Boolean)).toEqual([]);
    expect(readListView({ sort: 'beauty', turned: ['yes'], find: ['a', 'b'], form: '', own: 'no' })).toEqual(
      view,
    );
  });

  test('begins with the smallest for names and prices, else with the largest', () => {
    expect(isDescending({ sort: 'price', turned: undefined })).toBe(false);
    expect(isDescending({ sort: 'banks', turned: undefined })).toBe(true);
    expect(isDescending({ sort: 'name', turned: 'yes' })).toBe(true);
  });
});

describe('the price of a kWh delivered', () => {
  const price = { currency: 'EUR', perCellMinor: 6400 };

  test('is the cell’s price over its full cycles times its rated energy', () => {
    const told = deliveredPrice(entry('Any', life(10), { price }));
    // 64 EUR / (2000 x 0.32 kWh) = 0.10; the longer life of the range is the cheaper.
    expect(told).toMatchObject({ ok: true, currency: 'EUR' });
    if (!told.ok) return;
    expect(told.perKwh.estimate).toBeCloseTo(0.1, 12);
    expect(told.perKwh.lower).toBeCloseTo(64 / (2200 * 0.32), 12);
    expect(formatSmallMoney(told.perKwh.estimate, 'EUR')).toBe('€0.10');
    expect(formatSmallMoney(0.02134, 'EUR')).toBe('€0.021');
  });

  test('is not told without prices, nor of a life that is not the cell type’s own or not told', () => {
    expect(deliveredPrice(entry('Any', life(10)))).toEqual({ ok: false, reason: 'notEnoughPrices' });
    for (const of of [null, life(10, { basis: 'pool' }), life(40, { status: 'beyond' })])
      expect(deliveredPrice(entry('Any', of, { price }))).toEqual({ ok: false, reason: 'noLife' });
  });
});

describe('the share of banks above 80 % in words', () => {
  const point = {
    years: 6,
    lowestFraction: 0.92,
    highestFraction: 0.92,
    lowerFraction: 0.84,
    upperFraction: 0.96,
  };

  test('gives the share with its range, and both ends where it can not be told more closely', () => {
    const words = (change: object) =>
      survivalSentence({
        points: [{ ...point, smoothFraction: null, ...change }],
        hasFewCrossings: true,
      }).replaceAll('\u202f', ' ');
    expect(words({})).toBe(
      'At 6 years 92 % of banks were still above 80 % of their rating (90 % range 84–96 %). Banks of fewer than five owners have fallen below it so far.',
    );
    expect(words({ lowestFraction: 0.88 })).toMatch(/^At 6 years 88–92 % of banks/);
  });
});
