import { fadeChartData, leastX, rawChecks } from '@/components/cells/fadeChartData';
import type { CellPage, Claim, CurvePoint, Life } from '@/lib/contract/cells';

const years = { estimate: 13, lower: 12, upper: 15 };
const life: Life = {
  ...{ status: 'projected', basis: 'cellType', support: 'shown', outside: [] },
  ...{ years, efc: { estimate: 2849, lower: 2630, upper: 3287 } },
  ...{ rangeOfBanks: { lower: 8, upper: 22 }, rangeOfBanksEfc: { lower: 1753, upper: 4821 } },
  ...{ leftAtReachFraction: { estimate: 0.87, lower: 0.86, upper: 0.88 }, reachYears: 7, reachEfc: 1534 },
  ...{ priorShareFraction: 0.05, ownShareFraction: 0.9 },
};
const point = (at: number, status: CurvePoint['status']): CurvePoint => ({
  ...{ years: at, efc: at * 219, status },
  ...{ sohFraction: 1 - at / 65, lower: 0.9 - at / 65, upper: 1.1 - at / 65 },
});
const claim = (cycles: number, impliedYears: number | null): Claim => ({
  ...{
    id: String(cycles),
    cycles,
    endOfLifeFraction: 0.8,
    depthFraction: 1,
    chargeIt: 0.5,
    dischargeIt: 0.5,
  },
  ...{ temperatureC: 25, clamping: 'none', clampForceN: null, whereItStands: 'sheet', efc: cycles },
  label: impliedYears === null ? null : label(impliedYears),
  labelAbsence: impliedYears === null ? 'conditionsNotStated' : null,
});
const label = (at: number) => ({
  impliedYears: { estimate: at, lower: at - 1, upper: at + 1 },
  impliedEfc: { estimate: at * 219, lower: (at - 1) * 219, upper: (at + 1) * 219 },
  ratio: null,
});
const view: CellPage['view'] = {
  ...{ evidence: null, absence: null, dots: [{ years: 2, efc: 440, sohFraction: 0.97 }], life },
  curve: [point(1, 'measured'), point(7, 'measured'), point(14, 'projected'), point(21, 'extrapolated')],
};

const cellType = { ratedAh: 100, nominalV: 3.2 };

describe('fadeChartData', () => {
  test('labels one claim as the label, several by their cycles, and draws none without conditions', () => {
    const one = fadeChartData({ view, cellType, claims: [claim(6000, 14), claim(9000, null)] }, 'years');
    expect(one.claims).toEqual([{ x: 14, label: 'the label, at this use' }]);
    const two = fadeChartData({ view, cellType, claims: [claim(6000, 14), claim(4600, 12)] }, 'efc');
    expect(two.claims).toEqual([
      { x: 14 * 219, label: 'label, 6,000 cycles' },
      { x: 12 * 219, label: 'label, 4,600 cycles' },
    ]);
  });

  test('ends the curve a little past the range of the life', () => {
    const { curve, banks } = fadeChartData({ view, cellType, claims: [] }, 'years');
    expect(curve.map(({ x }) => x)).toEqual([1, 7, 14]);
    expect(banks).toEqual({ lower: 8, upper: 22 });
  });

  test('marks no crossing of a life that is not told as a number', () => {
    const told = (change: Partial<Life>) =>
      fadeChartData({ view: { ...view, life: { ...life, ...change } }, cellType, claims: [] }, 'years');
    expect(told({ status: 'beyond' })).toMatchObject({ life: null, banks: null });
    expect(told({ support: 'notMeasured' })).toMatchObject({ life: null, banks: null });
    expect(told({ status: 'extrapolated' })).toMatchObject({ life: { status: 'extrapolated' }, banks: null });
  });

  test('tells energy as full cycles times rated Ah and nominal V', () => {
    const drawn = fadeChartData({ view, cellType, claims: [claim(6000, 14)] }, 'energy');
    // 100 Ah x 3.2 V = 0.32 kWh a full cycle.
    expect(drawn.life!.estimate).toBeCloseTo(2849 * 0.32, 9);
    expect(drawn.reachX).toBeCloseTo(1534 * 0.32, 9);
    expect(drawn.claims[0]!.x).toBeCloseTo(14 * 219 * 0.32, 9);
    expect(leastX({ view, cellType, claims: [] }, 'energy')).toBeCloseTo(1.15 * 3287 * 0.32, 9);
  });

  test('brings medians to the axis, and draws none in a band', () => {
    const bin = { from: 200, to: 400, median: 0.95, lower: 0.94, upper: 0.96 };
    const bins = { years: [], efc: [bin] };
    const raw = rawChecks({ view, cellType, bins, band: null }, 'energy');
    expect(raw.checks[0]!.x).toBeCloseTo(440 * 0.32, 9);
    expect(raw.bins[0]).toMatchObject({ from: 64, to: 128, median: 0.95 });
    expect(rawChecks({ view, cellType, bins, band: 'depth:deep' }, 'efc').bins).toEqual([]);
  });
});
