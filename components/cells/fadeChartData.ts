import type { FadeChartProps, FadeClaim, FadePoint } from '@/components/charts';
import type { CellPage, CurvePoint } from '@/lib/contract/cells';

import { quotedYears } from './quotedLife';

export type FadeAxis = 'years' | 'efc';

type FadeChartData = Pick<FadeChartProps, 'checks' | 'curve' | 'reachX' | 'life' | 'claims' | 'xUnit'>;

/** What the fade chart draws of a page, on the axis chosen. */
export function fadeChartData(
  { view, claims, use }: Pick<CellPage, 'view' | 'claims' | 'use'>,
  axis: FadeAxis,
): FadeChartData {
  const { life, dots, curve } = view;
  const span = life && (axis === 'years' ? life.years : life.efc);
  return {
    xUnit: axis,
    checks: dots.map((dot) => ({ x: dot[axis], soh: dot.sohFraction })),
    curve: curve.flatMap((point) => fadePoint(point, axis)),
    reachX: life && (axis === 'years' ? life.reachYears : life.reachEfc),
    life: span && life.status !== 'beyond' ? { ...span, status: life.status } : null,
    claims: claims.flatMap((claim): FadeClaim[] => {
      const x = axis === 'years' ? quotedYears(claim, use) : claim.efc;
      return x ? [{ x, label: 'the label' }] : [];
    }),
  };
}

/** No figure is drawn past three times the reach. */
function fadePoint(point: CurvePoint, axis: FadeAxis): FadePoint[] {
  const { sohFraction, lower, upper, status } = point;
  return status === 'beyond' ? [] : [{ x: point[axis], soh: sohFraction, lower, upper, status }];
}
