import { useMemo } from 'react';
import { View } from 'react-native';
import Svg, { Circle, G, Line, Path, Rect, Text as SvgText } from 'react-native-svg';
import { formatNumber, formatPercent } from '@/lib/units';
import { color, font, size, type Color } from '../theme';
import { Table } from '../ui';
import { Axes } from './Axes';
import { ChartFrame } from './ChartFrame';
import { niceTicks, xOf, yOf, type PlotArea } from './chartScale';
import { compareDomain, labelPoint, type ComparedCurve } from './compareSeries';
import { endOfLifeFraction, fadeAt, fadeParts, type FadePoint } from './fadeSeries';
import { fadeHeight } from './heights';
import { placeLabels } from './placeLabels';
import { ReadingLayer } from './ReadingLayer';

export interface CompareChartProps {
  title: string;
  curves: readonly ComparedCurve[];
}

const dashes = { measured: undefined, projected: '7 5', extrapolated: '1.5 4' } as const;
// The mark and the name at its end tell curves apart; the colour repeats it.
const looks: readonly { tone: Color; mark: 'circle' | 'square' | 'diamond' | 'ring' }[] = [
  { tone: 'tide', mark: 'circle' },
  { tone: 'ink', mark: 'square' },
  { tone: 'moss', mark: 'diamond' },
  { tone: 'rust', mark: 'ring' },
];
const readingCount = 24;

/** Fade curves of a few cell types over years, each named at its end. */
export function CompareChart({ title, curves }: CompareChartProps) {
  const summary = [`${title}.`, ...curves.map(({ label, curve }) => `${label}: ${curveWords(curve)}.`)].join(
    ' ',
  );
  return (
    <ChartFrame
      title={title}
      hasHeading
      summary={summary}
      height={fadeHeight + 40}
      table={() => <CurvesTable title={title} curves={curves} />}
    >
      {(width) => <SizedCurves title={title} curves={curves} width={width} />}
    </ChartFrame>
  );
}

function SizedCurves({ title, curves, width }: CompareChartProps & { width: number }) {
  const plot = useMemo<PlotArea>(() => {
    const { x, y } = compareDomain(curves);
    return { width, height: fadeHeight, left: 40, right: 18, top: 34, bottom: 46, xDomain: x, yDomain: y };
  }, [width, curves]);
  const [from, to] = plot.xDomain;
  const years = Array.from({ length: readingCount }, (_, i) => from + ((i + 1) * (to - from)) / readingCount);
  return (
    <View>
      <Svg width={width} height={fadeHeight} aria-hidden>
        <Axes
          plot={plot}
          xTicks={niceTicks(plot.xDomain, width < 480 ? 4 : 8)}
          yTicks={niceTicks(plot.yDomain, 5)}
          xTitle="years since new"
          yTitle="capacity left, % of rated (from 70 %)"
          formatX={(value) => formatNumber(value)}
          formatY={(value) => formatNumber(value * 100, { decimals: 0 })}
        />
        <Line
          x1={plot.left}
          x2={width - plot.right}
          y1={yOf(plot, endOfLifeFraction)}
          y2={yOf(plot, endOfLifeFraction)}
          stroke={color.ink}
          strokeWidth={1.25}
        />
        {curves.map((curve, index) => (
          <Curve key={curve.label} plot={plot} curve={curve} look={lookOf(index)} />
        ))}
        <Names plot={plot} curves={curves} />
      </Svg>
      <ReadingLayer
        label={title}
        readings={years.map((x) => ({
          x: xOf(plot, x),
          marks: [],
          text: `${formatNumber(x, { decimals: 1 })} years: ${curves.map((one) => readingOf(one, x)).join('; ')}`,
        }))}
        width={width}
        height={fadeHeight}
        top={plot.top}
        bottom={fadeHeight - plot.bottom}
      />
    </View>
  );
}

const lookOf = (index: number) => looks[index % looks.length]!;

const readingOf = ({ label, curve }: ComparedCurve, x: number): string => {
  const point = fadeAt(curve, x);
  return `${label} ${point ? `${formatPercent(point.soh)} (${point.status})` : 'no figure'}`;
};

function Curve({
  plot,
  curve,
  look,
}: {
  plot: PlotArea;
  curve: ComparedCurve;
  look: (typeof looks)[number];
}) {
  const end = labelPoint(curve.curve, plot.yDomain[0]);
  return (
    <G>
      {fadeParts(curve.curve).map(({ status, points }) => (
        <Path
          key={status}
          d={`M${points
            .filter(({ soh }) => soh >= plot.yDomain[0])
            .map((point) => `${xOf(plot, point.x).toFixed(1)} ${yOf(plot, point.soh).toFixed(1)}`)
            .join('L')}`}
          fill="none"
          stroke={color[look.tone]}
          strokeWidth={2.25}
          strokeDasharray={dashes[status]}
        />
      ))}
      {end && <Mark x={xOf(plot, end.x)} y={yOf(plot, end.soh)} look={look} />}
    </G>
  );
}

function Mark({ x, y, look: { tone, mark } }: { x: number; y: number; look: (typeof looks)[number] }) {
  if (mark === 'square') return <Rect x={x - 5} y={y - 5} width={10} height={10} fill={color[tone]} />;
  if (mark === 'diamond')
    return <Path d={`M${x} ${y - 7}L${x + 7} ${y}L${x} ${y + 7}L${x - 7} ${y}Z`} fill={color[tone]} />;
  return (
    <Circle
      cx={x}
      cy={y}
      r={5}
      fill={mark === 'ring' ? color.surface : color[tone]}
      stroke={color[tone]}
      strokeWidth={2}
    />
  );
}

function Names({ plot, curves }: { plot: PlotArea; curves: readonly ComparedCurve[] }) {
  const wishes = curves.flatMap(({ label, curve }) => {
    const end = labelPoint(curve, plot.yDomain[0]);
    if (!end) return [];
    const sides = [-14, 26, -30, 42, -46].flatMap((dy) => [
      { dx: 0, dy, anchor: 'end' as const },
      { dx: 8, dy, anchor: 'start' as const },
    ]);
    return [
      {
        id: label,
        text: label,
        x: xOf(plot, end.x),
        y: yOf(plot, end.soh),
        fontSize: size.small,
        offsets: sides,
      },
    ];
  });
  const bounds = { x: plot.left, y: 0, width: plot.width - plot.left, height: plot.height - plot.bottom };
  return placeLabels(wishes, bounds, []).map((label) => (
    <SvgText
      key={label.id}
      x={label.x}
      y={label.y}
      textAnchor={label.anchor}
      fontFamily={font.words}
      fontSize={size.small}
      fontWeight="600"
      fill={color[lookOf(curves.findIndex((one) => one.label === label.id)).tone]}
    >
      {label.text}
    </SvgText>
  ));
}

function curveWords(curve: readonly FadePoint[]): string {
  const end = curve.find(({ soh }) => soh <= endOfLifeFraction);
  const measured = curve.findLast(({ status }) => status === 'measured');
  const read = measured
    ? `${formatPercent(measured.soh)} left at ${formatNumber(measured.x, { decimals: 1 })} years, measured`
    : 'nothing measured';
  return end ? `${read}; 80 % near ${formatNumber(end.x, { decimals: 0 })} years, ${end.status}` : read;
}

function CurvesTable({ title, curves }: CompareChartProps) {
  const [, last] = compareDomain(curves).x;
  const rows = Array.from({ length: Math.floor(last / 2) + 1 }, (_, i) => i * 2).filter((years) => years > 0);
  return (
    <Table
      caption={title}
      rows={rows}
      rowKey={String}
      columns={[
        { key: 'years', title: 'Years', figures: true, cell: (years) => formatNumber(years) },
        ...curves.map(({ label, curve }) => ({
          key: label,
          title: label,
          figures: true,
          cell: (years: number) => {
            const point = fadeAt(curve, years);
            return (
              point && `${formatPercent(point.soh)} ${point.status === 'measured' ? '' : `(${point.status})`}`
            );
          },
        })),
      ]}
    />
  );
}
