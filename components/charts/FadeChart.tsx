import { useMemo, type ReactNode } from 'react';
import { View } from 'react-native';
import { formatCount, formatPercent, formatRange } from '@/lib/units';
import { Quiet, Table } from '../ui';
import { ChartFrame } from './ChartFrame';
import { niceTicks, xOf, yOf, type PlotArea } from './chartScale';
import { FadeDrawing } from './FadeDrawing';
import { fadeAt, fadeDomain, thinChecks, type FadeCheck, type FadeClaim, type FadePoint } from './fadeSeries';
import { fadeReading, fadeSummary, fadeX, type FadeBanks, type FadeLife, type FadeUnit } from './fadeWords';
import { fadeHeight } from './heights';
import { ReadingLayer, type Reading } from './ReadingLayer';

export interface FadeChartProps {
  title: string;
  xUnit: FadeUnit;
  checks: readonly FadeCheck[];
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
  const domain = useMemo(
    () =>
      fadeDomain(checks, curve, claims, life && life.status !== 'extrapolated' ? life.estimate : undefined),
    [checks, curve, claims, life],
  );
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
  const yTitle = `capacity left, % of ${relativeTo} (from ${Math.round(domain.y[0] * 100)} %)`;
  const xTitle = xUnit === 'years' ? 'years since new' : 'equivalent full cycles (EFC) since new';

  return (
    <ChartFrame
      title={title}
      summary={summary}
      height={fadeHeight + 40}
      controls={controls}
      computed={computed}
      table={() => <FadeTable title={title} curve={curve} claims={claims} unit={xUnit} />}
    >
      {(width) => (
        <SizedFade
          {...{ width, domain, drawn, curve, reachX, life, banks, claims, xUnit, xTitle, yTitle, title }}
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
  domain: ReturnType<typeof fadeDomain>;
  drawn: readonly FadeCheck[];
  total: number;
  xTitle: string;
  yTitle: string;
}

function SizedFade({ width, domain, drawn, total, title, ...drawing }: SizedFadeProps) {
  const plot = useMemo<PlotArea>(
    () => ({
      width,
      height: fadeHeight,
      left: 40,
      right: 20,
      top: 34,
      bottom: 46,
      xDomain: domain.x,
      yDomain: domain.y,
    }),
    [width, domain],
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
      {drawn.length < total && (
        <Quiet>{`${formatCount(drawn.length)} of ${formatCount(total)} checks are drawn; all are counted.`}</Quiet>
      )}
    </View>
  );
}

interface FadeTableProps {
  title: string;
  curve: readonly FadePoint[];
  claims: readonly FadeClaim[];
  unit: FadeUnit;
}

function FadeTable({ title, curve, claims, unit }: FadeTableProps) {
  const points = niceTicks([curve[0]?.x ?? 0, curve.at(-1)?.x ?? 0], 12)
    .map((x) => fadeAt(curve, x))
    .filter((point) => point !== undefined);
  return (
    <>
      <Table
        caption={title}
        rows={points}
        rowKey={(point) => String(point.x)}
        empty="There is no curve to list."
        columns={[
          {
            key: 'x',
            title: unit === 'years' ? 'Years' : 'Full cycles',
            cell: (point) => fadeX(point.x, unit),
          },
          {
            key: 'soh',
            title: 'Left, %',
            figures: true,
            cell: (point) => (point.status === 'extrapolated' ? null : formatPercent(point.soh, 1)),
          },
          {
            key: 'range',
            title: '90 % range, %',
            figures: true,
            cell: (point) => formatRange(point.lower * 100, point.upper * 100, { decimals: 1 }),
          },
          { key: 'status', title: 'Standing', cell: (point) => point.status },
        ]}
      />
      {claims.map((claim) => (
        <Quiet
          key={`${claim.x} ${claim.label}`}
        >{`${claim.label}: ${fadeX(claim.x, unit)} to 80 %, quoted.`}</Quiet>
      ))}
    </>
  );
}
