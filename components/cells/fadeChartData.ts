import type { FadeBin, FadeChartProps, FadeClaim, FadePoint, FadeUnit } from '@/components/charts';
import type { CellPage, CurvePoint, Estimate, Life } from '@/lib/contract/cells';

import { carriedClaims, claimLabel } from './cellWords';
import { toldOf } from './lifeWords';

type FadeChartData = Pick<
  FadeChartProps,
  'checks' | 'bins' | 'curve' | 'reachX' | 'life' | 'banks' | 'claims' | 'xUnit'
>;

interface Drawn extends Pick<CellPage, 'view' | 'claims'> {
  cellType: Pick<CellPage['cellType'], 'ratedAh' | 'nominalV'>;
}

/** Medians are of the whole cell type: a band has none. */
type Raw = Pick<Drawn, 'view' | 'cellType'> & Partial<Pick<CellPage, 'bins' | 'band'>>;

/** kWh that a cell delivers in one full cycle, by its rating. */
const kwhPerCycle = ({ ratedAh, nominalV }: Drawn['cellType']) => (ratedAh * nominalV) / 1000;

/** Each unit of x: which of a figure's two lengths it is read from, and times what. */
function scaleOf(axis: FadeUnit, cellType: Drawn['cellType']) {
  const key = axis === 'years' ? 'years' : 'efc';
  const factor = axis === 'energy' ? kwhPerCycle(cellType) : 1;
  return { key, factor } as const;
}

/** Single checks and their medians: they do not move with the use. */
export function rawChecks({ view, bins, band = null, cellType }: Raw, axis: FadeUnit) {
  const { key, factor } = scaleOf(axis, cellType);
  return {
    checks: view.dots.map((dot) => ({ x: dot[key] * factor, soh: dot.sohFraction })),
    bins:
      band === null && bins
        ? bins[key].map((bin): FadeBin => ({ ...bin, from: bin.from * factor, to: bin.to * factor }))
        : [],
  };
}

/** What the fade chart draws of a page beside its raw checks, on the axis chosen. */
export function fadeChartData(
  { view, claims, cellType }: Drawn,
  axis: FadeUnit,
): Omit<FadeChartData, 'checks' | 'bins'> {
  const { life, curve } = view;
  const { key, factor } = scaleOf(axis, cellType);
  // A band's single curve knows no label: what a claim implies is the pooled model's word.
  const carried = life?.basis === 'band' ? [] : carriedClaims(claims);
  const isTold = life !== null && ['figure', 'range'].includes(toldOf(life));
  const end = life ? endOfCurve(life, key) : Infinity;
  const span = life && scaled(key === 'years' ? life.years : life.efc, factor);
  const banks = life && (key === 'years' ? life.rangeOfBanks : life.rangeOfBanksEfc);
  return {
    xUnit: axis,
    curve: curve.filter((point) => point[key] <= end).flatMap((point) => fadePoint(point, key, factor)),
    reachX: life && (key === 'years' ? life.reachYears : life.reachEfc) * factor,
    life: isTold && span && life.status !== 'beyond' ? { ...span, status: life.status } : null,
    banks: isTold && banks && life.status !== 'extrapolated' ? scaledEnds(banks, factor) : null,
    claims: carried.map((claim): FadeClaim => {
      const { impliedYears, impliedEfc } = claim.label;
      const x = (key === 'years' ? impliedYears : impliedEfc).estimate * factor;
      return { x, label: claimLabel(claim, carried.length) };
    }),
  };
}

/** How far the level axis goes at least: as far as at the standard use, so that it stands still while the use moves. */
export function leastX(page: Drawn, axis: FadeUnit): number {
  const { key, factor } = scaleOf(axis, page.cellType);
  return page.view.life ? endOfCurve(page.view.life, key) * factor : 0;
}

const scaledEnds = ({ lower, upper }: { lower: number; upper: number }, factor: number) => ({
  lower: lower * factor,
  upper: upper * factor,
});
const scaled = (span: Estimate, factor: number) => ({
  ...scaledEnds(span, factor),
  estimate: span.estimate * factor,
});

/** A little past what is said of the life: the curve goes on for long where nothing more is told. */
function endOfCurve(life: Life, key: 'years' | 'efc'): number {
  const reach = key === 'years' ? life.reachYears : life.reachEfc;
  return Math.max(1.5 * reach, 1.15 * (key === 'years' ? life.years : life.efc).upper);
}

/** No figure is drawn past three times the reach. */
function fadePoint(point: CurvePoint, key: 'years' | 'efc', factor: number): FadePoint[] {
  const { sohFraction, lower, upper, status } = point;
  return status === 'beyond' ? [] : [{ x: point[key] * factor, soh: sohFraction, lower, upper, status }];
}
