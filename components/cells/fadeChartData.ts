import type { FadeChartProps, FadeClaim, FadePoint } from '@/components/charts';
import type { CellPage, CurvePoint, Life } from '@/lib/contract/cells';

import { carriedClaims, claimLabel } from './cellWords';
import { toldOf } from './lifeWords';

export type FadeAxis = 'years' | 'efc';

type FadeChartData = Pick<
  FadeChartProps,
  'checks' | 'curve' | 'reachX' | 'life' | 'banks' | 'claims' | 'xUnit'
>;

/** What the fade chart draws of a page, on the axis chosen. */
export function fadeChartData(
  { view, claims }: Pick<CellPage, 'view' | 'claims'>,
  axis: FadeAxis,
): FadeChartData {
  const { life, dots, curve } = view;
  // A band's single curve knows no label: what a claim implies is the pooled model's word.
  const carried = life?.basis === 'band' ? [] : carriedClaims(claims);
  const isTold = life !== null && ['figure', 'range'].includes(toldOf(life));
  const end = life ? endOfCurve(life, axis) : Infinity;
  return {
    xUnit: axis,
    checks: dots.map((dot) => ({ x: dot[axis], soh: dot.sohFraction })),
    curve: curve.flatMap((point) => fadePoint(point, axis)).filter(({ x }) => x <= end),
    reachX: life && (axis === 'years' ? life.reachYears : life.reachEfc),
    life: isTold && life.status !== 'beyond' ? { ...spanOf(life, axis), status: life.status } : null,
    banks: isTold && life.status !== 'extrapolated' ? banksOf(life, axis) : null,
    claims: carried.map((claim): FadeClaim => {
      const { impliedYears, impliedEfc } = claim.label;
      const x = (axis === 'years' ? impliedYears : impliedEfc).estimate;
      return { x, label: claimLabel(claim, carried.length) };
    }),
  };
}

const spanOf = (life: Life, axis: FadeAxis) => (axis === 'years' ? life.years : life.efc);
const banksOf = (life: Life, axis: FadeAxis) => (axis === 'years' ? life.rangeOfBanks : life.rangeOfBanksEfc);

/** A little past what is said of the life: the curve goes on for long where nothing more is told. */
function endOfCurve(life: Life, axis: FadeAxis): number {
  const reach = axis === 'years' ? life.reachYears : life.reachEfc;
  return Math.max(1.5 * reach, 1.15 * spanOf(life, axis).upper);
}

/** No figure is drawn past three times the reach. */
function fadePoint(point: CurvePoint, axis: FadeAxis): FadePoint[] {
  const { sohFraction, lower, upper, status } = point;
  return status === 'beyond' ? [] : [{ x: point[axis], soh: sohFraction, lower, upper, status }];
}
