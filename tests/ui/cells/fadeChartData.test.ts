import { fadeChartData } from '@/components/cells/fadeChartData';
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

describe('fadeChartData', () => {
  test('labels one claim as the label, several by their cycles, and draws none without conditions', () => {
    const one = fadeChartData({ view, claims: [claim(6000, 14), claim(9000, null)] }, 'years');
    expect(one.claims).toEqual([{ x: 14, label: 'the label, at this use' }]);
    const two = fadeChartData({ view, claims: [claim(6000, 14), claim(4600, 12)] }, 'efc');
    expect(two.claims).toEqual([
      { x: 14 * 219, label: 'label, 6,000 cycles' },
      { x: 12 * 219, label: 'label, 4,600 cycles' },
    ]);
  });

  test('ends the curve a little past the range of the life', () => {
    const { curve, banks } = fadeChartData({ view, claims: [] }, 'years');
    expect(curve.map(({ x }) => x)).toEqual([1, 7, 14]);
    expect(banks).toEqual({ lower: 8, upper: 22 });
  });

  test('marks no crossing of a life that is not told as a number', () => {
    const told = (change: Partial<Life>) =>
      fadeChartData({ view: { ...view, life: { ...life, ...change } }, claims: [] }, 'years');
    expect(told({ status: 'beyond' })).toMatchObject({ life: null, banks: null });
    expect(told({ support: 'notMeasured' })).toMatchObject({ life: null, banks: null });
    expect(told({ status: 'extrapolated' })).toMatchObject({ life: { status: 'extrapolated' }, banks: null });
  });
});
