import { useMemo, type ReactNode } from 'react';
import { View } from 'react-native';
import Svg, { G, Text as SvgText } from 'react-native-svg';
import { VictoryArea, VictoryLine } from 'victory-native';
import { formatNumber, formatPercent } from '@/lib/units';
import { color, font, size } from '../theme';
import { Table } from '../ui';
import { Axes, frameOf } from './Axes';
import { ChartFrame } from './ChartFrame';
import { CheckMark } from './CheckMark';
import { niceTicks, xOf, yOf, type PlotArea } from './chartScale';
import { historyHeight } from './heights';
import {
  historyDomain,
  historyReading,
  joinedChecks,
  type ExpectedBand,
  type HistoryCheck,
} from './historySeries';
import { placeLabels, textWidth } from './placeLabels';
import { ReadingLayer } from './ReadingLayer';

export interface HistoryChartProps {
  title: string;
  /** Years since first use. */
  checks: readonly HistoryCheck[];
  /** Where banks used like this one lie; left out where the pool can't say. */
  expected?: readonly ExpectedBand[];
  computed?: ReactNode;
}

/** A bank's own checks with their uncertainty, on the range of banks used like it. */
export function HistoryChart({ title, checks, expected = [], computed }: HistoryChartProps) {
  const summary = [
    `${title}.`,
    expected.length > 0 && 'The bands hold 50 and 80 % of banks used like this one.',
    ...checks.map((check) => `${historyReading(check)}.`),
  ]
    .filter(Boolean)
    .join(' ');
  return (
    <ChartFrame
      title={title}
      hasHeading
      summary={summary}
      height={historyHeight + 40}
      computed={computed}
      table={() => <HistoryTable title={title} checks={checks} />}
    >
      {(width) => <SizedHistory {...{ width, title, checks, expected }} />}
    </ChartFrame>
  );
}

interface SizedHistoryProps {
  width: number;
  title: string;
  checks: readonly HistoryCheck[];
  expected: readonly ExpectedBand[];
}

function SizedHistory({ width, title, checks, expected }: SizedHistoryProps) {
  const plot = useMemo<PlotArea>(() => {
    const { x, y } = historyDomain(checks, expected);
    return { width, height: historyHeight, left: 40, right: 14, top: 34, bottom: 46, xDomain: x, yDomain: y };
  }, [width, checks, expected]);
  const frame = frameOf(plot);
  const joined = joinedChecks(checks);
  const hold = expected.length > 0 ? '; bands hold 50 and 80 % of banks used like it' : '';
  const long = `capacity left, % of rated (from ${Math.round(plot.yDomain[0] * 100)} %)${hold}`;
  const yTitle = textWidth(long, size.small) > width - plot.left ? 'capacity left, %' : long;
  return (
    <View>
      <Svg width={width} height={historyHeight} aria-hidden>
        {(['outer', 'inner'] as const).map((which) => (
          <G key={which}>
            {expected.length > 1 && (
              <VictoryArea
                {...frame}
                data={expected.map((point) => ({ x: point.x, y: point[which][1], y0: point[which][0] }))}
                style={{
                  data: { fill: color.tide, fillOpacity: which === 'outer' ? 0.1 : 0.12, stroke: 'none' },
                }}
              />
            )}
          </G>
        ))}
        <Axes
          plot={plot}
          xTicks={niceTicks(plot.xDomain, 6)}
          yTicks={niceTicks(plot.yDomain, 5)}
          xTitle="years since first use"
          yTitle={yTitle}
          formatX={(value) => formatNumber(value)}
          formatY={(value) => formatNumber(value * 100, { decimals: 0 })}
        />
        {joined.length > 1 && (
          <VictoryLine
            {...frame}
            data={joined.map((check) => ({ x: check.x, y: check.soh }))}
            style={{ data: { stroke: color.tide, strokeWidth: 1.75 } }}
          />
        )}
        {checks.map((check) => (
          <CheckMark key={check.id} plot={plot} check={check} />
        ))}
        <Remarks plot={plot} checks={checks} />
      </Svg>
      <ReadingLayer
        label={title}
        readings={[...checks]
          .sort((a, b) => a.x - b.x)
          .map((check) => ({ x: xOf(plot, check.x), marks: [], text: historyReading(check) }))}
        width={width}
        height={historyHeight}
        top={plot.top}
        bottom={historyHeight - plot.bottom}
      />
    </View>
  );
}

function Remarks({ plot, checks }: { plot: PlotArea; checks: readonly HistoryCheck[] }) {
  const marks = checks.map((check) => ({
    x: xOf(plot, check.x) - 7,
    y: yOf(plot, check.soh + check.plusMinus),
    width: 14,
    height: yOf(plot, check.soh - check.plusMinus) - yOf(plot, check.soh + check.plusMinus),
  }));
  const wishes = checks.flatMap((check) =>
    check.remark
      ? [
          {
            id: check.id,
            text: check.remark,
            x: xOf(plot, check.x),
            y: yOf(plot, check.soh),
            fontSize: size.small,
            offsets: [
              { dx: 10, dy: 4, anchor: 'start' as const },
              { dx: -10, dy: 4, anchor: 'end' as const },
              { dx: 0, dy: -22, anchor: 'middle' as const },
              { dx: 0, dy: 30, anchor: 'middle' as const },
            ],
          },
        ]
      : [],
  );
  const bounds = { x: plot.left, y: 0, width: plot.width - plot.left, height: plot.height - plot.bottom };
  return placeLabels(wishes, bounds, marks).map((label) => (
    <SvgText
      key={label.id}
      x={label.x}
      y={label.y}
      textAnchor={label.anchor}
      fontFamily={font.words}
      fontSize={size.small}
      fontWeight="600"
      fill={color.rust}
    >
      {label.text}
    </SvgText>
  ));
}

function HistoryTable({ title, checks }: { title: string; checks: readonly HistoryCheck[] }) {
  return (
    <Table
      caption={title}
      rows={checks}
      rowKey={(check) => check.id}
      empty="There are no checks yet."
      columns={[
        { key: 'when', title: 'Check', cell: (check) => check.when, sortValue: (check) => check.x },
        { key: 'x', title: 'Years', figures: true, cell: (check) => formatNumber(check.x, { decimals: 1 }) },
        { key: 'soh', title: 'Left', figures: true, cell: (check) => formatPercent(check.soh, 1) },
        { key: 'pm', title: '± at 95 %', figures: true, cell: (check) => formatPercent(check.plusMinus, 1) },
        {
          key: 'remark',
          title: 'Remark',
          cell: (check) => check.remark ?? (check.isLeftOut ? 'left out of the fit' : ''),
        },
      ]}
    />
  );
}
