import { memo, useMemo, type ReactNode } from 'react';
import { View } from 'react-native';
import Svg, { Rect, Text as SvgText } from 'react-native-svg';
import { VictoryLine } from 'victory-native';
import { formatCount, formatDuration, formatNumber } from '@/lib/units';
import { color, font, size, type Color } from '../theme';
import { Table } from '../ui';
import { Axes, frameOf } from './Axes';
import { ChartFrame } from './ChartFrame';
import { niceTicks, xOf, yOf, type PlotArea } from './chartScale';
import { logPanelHeight } from './heights';
import { paddedDomain, runsOf, thinRun, timeUnitOf, type LogSeries } from './logSeries';
import { ReadingLayer, type Reading } from './ReadingLayer';
import type { TimeWindow } from './timeWindow';
import { WindowHandles } from './WindowHandles';

export interface LogChartProps {
  title: string;
  series: LogSeries;
  /** The part of the log whose charge was counted, in seconds from its first stamp. */
  window: TimeWindow | null;
  /** Lets the counted part be chosen on the drawing. */
  onWindow?: (window: TimeWindow) => void;
  computed?: ReactNode;
}

const mostPoints = 900;
const mostReadings = 120;
const tableRows = 24;

/** Voltage over current of a discharge log against time, with the counted part shaded. */
export function LogChart({ title, series, window: counted, onWindow, computed }: LogChartProps) {
  const end = series.timeS.at(-1) ?? 0;
  const start = series.timeS[0] ?? 0;
  const summary = [
    `${title}: ${formatCount(series.timeS.length)} readings over ${formatDuration(end - start)}.`,
    counted &&
      `Counted: from ${formatDuration(counted.startS)} to ${formatDuration(counted.endS)} after the first stamp.`,
    `${readingText(series, 0)}.`,
    `${readingText(series, series.timeS.length - 1)}.`,
  ]
    .filter(Boolean)
    .join(' ');
  return (
    <ChartFrame
      title={title}
      hasHeading
      summary={summary}
      height={2 * logPanelHeight + 40}
      computed={computed}
      table={() => <LogTable title={title} series={series} />}
    >
      {(width) => <SizedLog {...{ width, title, series, counted, onWindow }} />}
    </ChartFrame>
  );
}

interface SizedLogProps {
  width: number;
  title: string;
  series: LogSeries;
  counted: LogChartProps['window'];
  onWindow: LogChartProps['onWindow'];
}

/** Indices spread evenly over a series, its ends among them. */
const spread = (length: number, most: number): number[] => {
  const count = Math.min(length, most);
  return Array.from({ length: count }, (_, index) =>
    Math.round((index * (length - 1)) / Math.max(1, count - 1)),
  );
};

const logReadings = (series: LogSeries, plots: { voltage: PlotArea; current: PlotArea }): Reading[] =>
  spread(series.timeS.length, mostReadings).map((index) => {
    const [voltage, current] = [series.voltageV[index], series.currentA[index]];
    const marks: Reading['marks'] = [
      ...(typeof voltage === 'number' ? [{ y: yOf(plots.voltage, voltage), tone: 'tide' as const }] : []),
      ...(typeof current === 'number'
        ? [{ y: logPanelHeight + yOf(plots.current, current), tone: 'ink' as const }]
        : []),
    ];
    return { x: xOf(plots.voltage, series.timeS[index] ?? 0), marks, text: readingText(series, index) };
  });

function SizedLog({ width, title, series, counted, onWindow }: SizedLogProps) {
  const plots = useMemo(() => {
    const base = {
      width,
      height: logPanelHeight,
      left: 52,
      right: 14,
      top: 30,
      xDomain: [
        series.timeS[0] ?? 0,
        Math.max((series.timeS[0] ?? 0) + 1, series.timeS.at(-1) ?? 1),
      ] as const,
    };
    return {
      voltage: { ...base, bottom: 22, yDomain: paddedDomain(series.voltageV, false) },
      current: { ...base, bottom: 42, yDomain: paddedDomain(series.currentA, true) },
    };
  }, [width, series]);
  const readings = useMemo(() => logReadings(series, plots), [series, plots]);
  return (
    <View>
      <LogPanel
        plot={plots.voltage}
        values={series.voltageV}
        tone="tide"
        yTitle="voltage, V"
        {...{ series, counted }}
      />
      <LogPanel
        plot={plots.current}
        values={series.currentA}
        tone="ink"
        yTitle="current, A"
        hasTime
        {...{ series, counted }}
      />
      <ReadingLayer
        label={title}
        readings={readings}
        width={width}
        height={2 * logPanelHeight}
        top={plots.voltage.top}
        bottom={2 * logPanelHeight - plots.current.bottom}
      />
      {counted && onWindow && (
        <WindowHandles
          plot={plots.voltage}
          bottom={2 * logPanelHeight - plots.current.bottom}
          window={counted}
          onChange={onWindow}
          wordsOf={(edge, { startS, endS }) =>
            readingText(series, nearestIndex(series, edge === 'startS' ? startS : endS))
          }
        />
      )}
    </View>
  );
}

interface LogPanelProps {
  plot: PlotArea;
  series: LogSeries;
  values: readonly (number | null)[];
  counted: LogChartProps['window'];
  tone: Color;
  yTitle: string;
  /** Writes the shared time axis below. */
  hasTime?: boolean;
}

const LogPanel = memo(function LogPanel({
  plot,
  series,
  values,
  counted,
  tone,
  yTitle,
  hasTime = false,
}: LogPanelProps) {
  const runs = useMemo(() => {
    const all = runsOf(series.timeS, values);
    return all.map((run) => thinRun(run, Math.max(8, Math.floor(mostPoints / all.length))));
  }, [series, values]);
  const { unit, seconds } = timeUnitOf(plot.xDomain[1] - plot.xDomain[0]);
  const inUnit = [plot.xDomain[0] / seconds, plot.xDomain[1] / seconds] as const;
  const xTicks = niceTicks(inUnit, plot.width < 480 ? 4 : 8).map((tick) => tick * seconds);
  const [from, to] = counted ? [xOf(plot, counted.startS), xOf(plot, counted.endS)] : [0, 0];
  return (
    <Svg width={plot.width} height={plot.height} aria-hidden>
      {counted && (
        <Rect
          x={from}
          width={Math.max(1, to - from)}
          y={plot.top}
          height={plot.height - plot.top - plot.bottom}
          fill={color.tideWash}
        />
      )}
      <Axes
        plot={plot}
        xTicks={xTicks}
        yTicks={niceTicks(plot.yDomain, 4)}
        xTitle={hasTime ? `time since the first stamp, ${unit}` : undefined}
        yTitle={yTitle}
        formatX={(value) => (hasTime ? formatNumber(value / seconds) : '')}
        formatY={(value) => formatNumber(value)}
      />
      {counted && !hasTime && (
        <SvgText
          x={Math.min(from + 6, plot.width - 90)}
          y={plot.top + 16}
          fontFamily={font.words}
          fontSize={size.small}
          fill={color.tide}
        >
          counted part
        </SvgText>
      )}
      {runs.map((run) => (
        <VictoryLine
          key={run[0]?.timeS}
          {...frameOf(plot)}
          data={run.map(({ timeS, value }) => ({ x: timeS, y: value }))}
          style={{ data: { stroke: color[tone], strokeWidth: 1.75 } }}
        />
      ))}
    </Svg>
  );
});

/** The reading next to a time. */
const nearestIndex = ({ timeS }: LogSeries, seconds: number) =>
  timeS.reduce(
    (best, time, index) => (Math.abs(time - seconds) < Math.abs((timeS[best] ?? 0) - seconds) ? index : best),
    0,
  );

const valueText = (value: number | null | undefined, unit: string) =>
  typeof value === 'number' ? `${formatNumber(value)} ${unit}` : `no ${unit} reading`;

const readingText = (series: LogSeries, index: number) =>
  `After ${formatDuration(series.timeS[index] ?? 0)}: ${valueText(series.voltageV[index], 'V')}, ${valueText(series.currentA[index], 'A')}`;

function LogTable({ title, series }: { title: string; series: LogSeries }) {
  return (
    <Table
      caption={`${title}: readings spread evenly over the log`}
      showCaption
      rows={spread(series.timeS.length, tableRows)}
      rowKey={(index) => String(index)}
      empty="The log has no readings."
      columns={[
        { key: 'time', title: 'After', cell: (index) => formatDuration(series.timeS[index] ?? 0) },
        { key: 'v', title: 'V', figures: true, cell: (index) => formatNumber(series.voltageV[index] ?? NaN) },
        { key: 'a', title: 'A', figures: true, cell: (index) => formatNumber(series.currentA[index] ?? NaN) },
      ]}
    />
  );
}
