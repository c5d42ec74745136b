import { useMemo, type ReactNode } from 'react';
import { View } from 'react-native';
import Svg, { G, Line, Path, Rect } from 'react-native-svg';
import { formatCount, formatPercent, formatRange } from '@/lib/units';
import { color } from '../theme';
import { Quiet, Table } from '../ui';
import { Axes } from './Axes';
import { ChartFrame } from './ChartFrame';
import { niceTicks, xOf, yOf, type PlotArea } from './chartScale';
import { survivalHeight } from './heights';
import { ReadingLayer } from './ReadingLayer';

/** Share of banks still above a level at an age, 0..1; the lowest and highest it can be told to, and its 90 % range. */
export interface SurvivalPoint {
  years: number;
  lowestFraction: number;
  highestFraction: number;
  lowerFraction: number;
  upperFraction: number;
  smoothFraction: number | null;
}

export interface SurvivalChartProps {
  title: string;
  points: readonly SurvivalPoint[];
  /** One sentence on what is seen, for everyone. */
  finding: string;
  computed?: ReactNode;
}

/** Shares by age as bars from the lowest to the highest they can be, with their ranges, and the smooth curve. */
export function SurvivalChart({ title, points, finding, computed }: SurvivalChartProps) {
  return (
    <ChartFrame
      title={title}
      summary={`${title}. ${points.map((point) => `${reading(point)}.`).join(' ')}`}
      height={survivalHeight + 40}
      computed={computed}
      table={() => <SurvivalTable title={title} points={points} />}
    >
      {(width) => <SizedSurvival {...{ title, points, finding, width }} />}
    </ChartFrame>
  );
}

function SizedSurvival({ title, points, finding, width }: SurvivalChartProps & { width: number }) {
  const lowest = Math.min(...points.map(({ lowerFraction }) => lowerFraction));
  const last = points.at(-1)?.years ?? 1;
  const plot = useMemo<PlotArea>(
    () => ({
      ...{ width, height: survivalHeight, left: 40, right: 20, top: 34, bottom: 46 },
      xDomain: [0, last + 1],
      yDomain: [lowest < 0.5 ? 0 : 0.5, 1],
    }),
    [width, lowest, last],
  );
  const smooth = points.flatMap(({ years, smoothFraction }) =>
    smoothFraction === null
      ? []
      : [`${xOf(plot, years).toFixed(1)} ${yOf(plot, Math.max(plot.yDomain[0], smoothFraction)).toFixed(1)}`],
  );
  return (
    <View>
      <Svg width={width} height={survivalHeight} aria-hidden>
        <Axes
          plot={plot}
          xTicks={niceTicks(plot.xDomain, width < 480 ? 4 : 8)}
          yTicks={niceTicks(plot.yDomain, 5)}
          xTitle="years since new"
          yTitle={`banks above 80 % of rated, %${plot.yDomain[0] > 0 ? ' (from 50 %)' : ''}`}
          formatX={String}
          formatY={(value) => String(Math.round(value * 100))}
        />
        {points.map((point) => (
          <PointMark key={point.years} plot={plot} point={point} />
        ))}
        {smooth.length > 1 && (
          <Path
            d={`M${smooth.join('L')}`}
            fill="none"
            stroke={color.tide}
            strokeWidth={2}
            strokeDasharray="7 5"
          />
        )}
      </Svg>
      <ReadingLayer
        label={title}
        readings={points.map((point) => ({ x: xOf(plot, point.years), marks: [], text: reading(point) }))}
        width={width}
        height={survivalHeight}
        top={plot.top}
        bottom={survivalHeight - plot.bottom}
      />
      <Quiet tone="ink">{finding}</Quiet>
      <Quiet>
        {`Bars: the share as counted; lines: its 90 % range${smooth.length > 1 ? '; dashed: smooth curve' : ''}.`}
      </Quiet>
    </View>
  );
}

const barWidth = 12;

function PointMark({ plot, point }: { plot: PlotArea; point: SurvivalPoint }) {
  const x = xOf(plot, point.years);
  const at = (share: number) => yOf(plot, Math.max(plot.yDomain[0], share));
  const [top, foot] = [at(point.highestFraction), at(point.lowestFraction)];
  return (
    <G>
      <Line
        x1={x}
        x2={x}
        y1={at(point.upperFraction)}
        y2={at(point.lowerFraction)}
        stroke={color.tide}
        strokeWidth={1.5}
      />
      <Rect
        x={x - barWidth / 2}
        y={top - 2}
        width={barWidth}
        height={foot - top + 4}
        fill={color.tide}
        stroke={color.surface}
        strokeWidth={1}
      />
    </G>
  );
}

/** "92 %", or both ends where it can't be told more closely. */
const shareWords = ({ lowestFraction, highestFraction }: SurvivalPoint): string =>
  highestFraction - lowestFraction < 0.005
    ? formatPercent(highestFraction)
    : formatRange(lowestFraction * 100, highestFraction * 100, { decimals: 0, unit: '%' });

const rangeWords = ({ lowerFraction, upperFraction }: SurvivalPoint): string =>
  formatRange(lowerFraction * 100, upperFraction * 100, { decimals: 0, unit: '%' });

const reading = (point: SurvivalPoint): string =>
  `At ${formatCount(point.years)} years: ${shareWords(point)} of banks, 90 % range ${rangeWords(point)}`;

function SurvivalTable({ title, points }: Pick<SurvivalChartProps, 'title' | 'points'>) {
  return (
    <Table
      caption={title}
      rows={points}
      rowKey={({ years }) => String(years)}
      columns={[
        { key: 'years', title: 'Years', cell: ({ years }) => formatCount(years) },
        { key: 'share', title: 'Banks above 80 %', figures: true, cell: shareWords },
        { key: 'range', title: '90 % range', figures: true, cell: rangeWords },
        {
          key: 'smooth',
          title: 'Smooth curve',
          figures: true,
          cell: ({ smoothFraction }) => (smoothFraction === null ? null : formatPercent(smoothFraction)),
        },
      ]}
    />
  );
}
