import { useMemo, type ReactNode } from 'react';
import { View } from 'react-native';
import { formatCount } from '@/lib/units';
import { Quiet } from '../ui';
import { ChartFrame } from './ChartFrame';
import { type PlotArea, xOf, yOf } from './chartScale';
import { FadeDrawing } from './FadeDrawing';
import {
  fadeAt,
  type FadeBin,
  type FadeCheck,
  type FadeClaim,
  fadeDomain,
  type FadePoint,
  thinChecks,
} from './fadeSeries';
import { FadeTable } from './FadeTable';
import {
  fadeAxisTitle,
  type FadeBanks,
  type FadeLife,
  fadeReading,
  fadeSummary,
  type FadeUnit,
} from './fadeWords';
import { fadeHeight } from './heights';
import { ReadingLayer, type Reading } from './ReadingLayer';

export interface FadeChartProps {
  title: string;
  xUnit: FadeUnit;
  checks: readonly FadeCheck[];
  /** The raw checks summed up along x, to hold the curve against. */
  bins?: readonly FadeBin[];
  /** The level axis spans at least this, so that it stands still while a curve moves. */
  leastX?: number;
  /** In order of x; points beyond three times the reach are left out by the caller. Empty where there is no fit. */
  curve: readonly FadePoint[];
  /** How far the readings go, in the unit of x. */
  reachX: number | null;
  /** Where the curve crosses 80 %; null where no figure is given. */
  life: FadeLife | null;
  /** Within which 8 of 10 banks cross 80 %; left out where it is not known or not to be told. */
  banks?: FadeBanks | null;
  claims: readonly FadeClaim[];
  /** "Rated capacity" unless capacity is relative to the bank's own start. */
  relativeTo?: 'rated' | 'own start';
  controls?: ReactNode;
  computed?: ReactNode;
}

const readingCount = 60;
const noBins: readonly FadeBin[] = [];

const readingsOf = (plot: PlotArea, curve: readonly FadePoint[], unit: FadeUnit): Reading[] => {
  const [from, to] = [curve[0]?.x ?? 0, curve.at(-1)?.x ?? 0];
  return Array.from({ length: readingCount + 1 }, (_, index) =>
    fadeAt(curve, from + ((to - from) * index) / readingCount),
  )
    .filter((point) => point !== undefined)
    .map((point) => ({
      x: xOf(plot, point.x),
      marks: point.status === 'extrapolated' ? [] : [{ y: yOf(plot, point.soh), tone: 'tide' as const }],
      text: fadeReading(point, unit),
    }));
};

/** A cell type's or bank's fade: checks, the curve with its range, how far readings reach, and what the label says. */
export function FadeChart({
  title,
  xUnit,
  checks,
  bins = noBins,
  leastX,
  curve,
  reachX,
  life,
  banks = null,
  claims,
  relativeTo = 'rated',
  controls,
  computed,
}: FadeChartProps) {
  const drawn = useMemo(() => thinChecks(checks), [checks]);
  const told = life && life.status !== 'extrapolated' ? life.estimate : undefined;
  const { x, y } = fadeDomain(checks, curve, claims, told, leastX);
  const summary = fadeSummary({
    title,
    curve,
    checkCount: checks.length,
    reachX,
    life,
    banks,
    claims,
    unit: xUnit,
  });
  const yTitle = `capacity left, % of ${relativeTo} (from ${Math.round(y[0] * 100)} %)`;
  const xTitle = fadeAxisTitle(xUnit);

  return (
    <ChartFrame
      title={title}
      summary={summary}
      height={fadeHeight + 40}
      controls={controls}
      computed={computed}
      table={() => <FadeTable {...{ title, curve, bins, claims }} unit={xUnit} />}
    >
      {(width) => (
        <SizedFade
          {...{ width, drawn, bins, curve, reachX, life, banks, claims, xUnit, xTitle, yTitle, title }}
          {...{ endX: x[1], fromY: y[0], toY: y[1] }}
          total={checks.length}
        />
      )}
    </ChartFrame>
  );
}

interface SizedFadeProps extends Pick<
  FadeChartProps,
  'curve' | 'reachX' | 'life' | 'claims' | 'xUnit' | 'title'
> {
  banks: FadeBanks | null;
  width: number;
  endX: number;
  fromY: number;
  toY: number;
  drawn: readonly FadeCheck[];
  bins: readonly FadeBin[];
  total: number;
  xTitle: string;
  yTitle: string;
}

function SizedFade({ width, endX, fromY, toY, drawn, total, title, ...drawing }: SizedFadeProps) {
  const plot = useMemo<PlotArea>(
    () => ({
      width,
      height: fadeHeight,
      left: 40,
      right: 20,
      top: 34,
      bottom: 46,
      xDomain: [0, endX],
      yDomain: [fromY, toY],
    }),
    // By their values: an axis that spans the same stays as it is.
    [width, endX, fromY, toY],
  );
  const readings = useMemo(
    () => readingsOf(plot, drawing.curve, drawing.xUnit),
    [plot, drawing.curve, drawing.xUnit],
  );
  return (
    <View>
      <FadeDrawing plot={plot} checks={drawn} {...drawing} />
      <ReadingLayer
        label={title}
        readings={readings}
        width={width}
        height={fadeHeight}
        top={plot.top}
        bottom={fadeHeight - plot.bottom}
      />
      {drawing.bins.length > 0 && (
        <Quiet>
          Open circles are single checks; filled squares their medians, on the line of their middle 80 %.
        </Quiet>
      )}
      {drawn.length < total && (
        <Quiet>{`${formatCount(drawn.length)} of ${formatCount(total)} checks are drawn; all are counted.`}</Quiet>
      )}
    </View>
  );
}
