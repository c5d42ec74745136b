import { useMemo, type ReactNode } from 'react';
import { View } from 'react-native';
import Svg, { Circle, G, Line, Path, Rect } from 'react-native-svg';
import { formatCount, formatNumber, formatRange } from '@/lib/units';
import { color, size } from '../theme';
import { Quiet, Table } from '../ui';
import { Axes } from './Axes';
import { binDomain, binReading, binWords, placeBins, type BinSeries, type PlacedBin } from './binSeries';
import { ChartFrame } from './ChartFrame';
import { niceTicks, xOf, yOf, type PlotArea } from './chartScale';
import { binHeight } from './heights';
import { textWidth } from './placeLabels';
import { ReadingLayer } from './ReadingLayer';

export interface BinChartProps {
  title: string;
  hasHeading?: boolean;
  series: readonly BinSeries[];
  /** What lies along x: "cell temperature", "°C". */
  xName: string;
  unitX: string;
  formatX: (x: number) => string;
  /** Shares are shown in %; what they are of: "measured less predicted, %". */
  yTitle: string;
  /** In place of it where that is too long for the width. */
  yTitleShort: string;
  /** A level to hold the medians against: 0 for residuals; or the line on which x and y are the same. */
  reference?: 0 | 'same';
  /** One sentence on what is seen, for everyone. */
  finding: string;
  controls?: ReactNode;
  computed?: ReactNode;
}

/** Medians and middle 80 % of checks in bins along a condition, by marks of one shape per group. */
export function BinChart(props: BinChartProps) {
  const { title, hasHeading, series, finding, controls, computed } = props;
  const words = { formatX: props.formatX, unitX: props.unitX };
  const summary = [
    `${title}.`,
    finding,
    ...series.flatMap(({ label, points }) =>
      points.map((bin) => `${series.length > 1 ? `${label}: ` : ''}${binReading(bin, words)}.`),
    ),
  ].join(' ');
  return (
    <ChartFrame
      title={title}
      hasHeading={hasHeading}
      summary={summary}
      height={binHeight + 40}
      controls={controls}
      computed={computed}
      table={() => <BinTable {...props} />}
    >
      {(width) => <SizedBins {...props} width={width} />}
    </ChartFrame>
  );
}

function SizedBins({ width, ...props }: BinChartProps & { width: number }) {
  const { title, series, xName, unitX, formatX, yTitle, yTitleShort, reference, finding } = props;
  const plot = useMemo<PlotArea>(() => {
    const domain = binDomain(series, reference === 0 ? 0 : undefined);
    return {
      ...{ width, height: binHeight, left: 44, right: 14, top: 34, bottom: 46 },
      xDomain: domain.x,
      yDomain: domain.y,
    };
  }, [width, series, reference]);
  const fits = textWidth(yTitle, size.small) < width - plot.left;
  const yTicks = niceTicks(plot.yDomain, 5);
  const decimals = (yTicks[1] ?? 1) - (yTicks[0] ?? 0) < 0.0099 ? 1 : 0;
  const placed = series.map((one) => ({ ...one, bins: placeBins(one.points) }));
  return (
    <View>
      <Svg width={width} height={binHeight} aria-hidden>
        <Axes
          plot={plot}
          xTicks={niceTicks(plot.xDomain, width < 480 ? 4 : 8)}
          yTicks={yTicks}
          xTitle={`${xName}, ${unitX}`}
          yTitle={fits ? yTitle : yTitleShort}
          formatX={formatX}
          formatY={(value) => formatNumber(value * 100, { decimals })}
        />
        {reference !== undefined && <Reference plot={plot} reference={reference} />}
        {placed.map(({ label, mark, bins }, index) => (
          <G key={label}>
            <ModelLine plot={plot} bins={bins} />
            {bins.map((bin) => (
              <BinMark
                key={bin.x}
                plot={plot}
                bin={bin}
                mark={mark}
                shift={placed.length > 1 ? (index - (placed.length - 1) / 2) * 10 : 0}
              />
            ))}
          </G>
        ))}
      </Svg>
      <ReadingLayer
        label={title}
        readings={placed
          .flatMap(({ label, bins }) =>
            bins.map((bin) => ({
              x: xOf(plot, bin.x),
              marks: [],
              text: `${placed.length > 1 ? `${label}, ` : ''}${binReading(bin, { formatX, unitX })}`,
            })),
          )
          .sort((a, b) => a.x - b.x)}
        width={width}
        height={binHeight}
        top={plot.top}
        bottom={binHeight - plot.bottom}
      />
      <Quiet tone="ink">{finding}</Quiet>
    </View>
  );
}

function Reference({ plot, reference }: { plot: PlotArea; reference: 0 | 'same' }) {
  const from = reference === 0 ? plot.xDomain[0] : Math.max(plot.xDomain[0], plot.yDomain[0]);
  const to = reference === 0 ? plot.xDomain[1] : Math.min(plot.xDomain[1], plot.yDomain[1]);
  const [start, end] = reference === 0 ? [0, 0] : [from, to];
  return (
    <Line
      x1={xOf(plot, from)}
      y1={yOf(plot, start)}
      x2={xOf(plot, to)}
      y2={yOf(plot, end)}
      stroke={color.ink}
      strokeWidth={1.25}
    />
  );
}

function ModelLine({ plot, bins }: { plot: PlotArea; bins: readonly PlacedBin[] }) {
  const path = bins
    .flatMap(({ x, model }) =>
      model === null ? [] : [`${xOf(plot, x).toFixed(1)} ${yOf(plot, model).toFixed(1)}`],
    )
    .join('L');
  if (path === '') return null;
  return <Path d={`M${path}`} fill="none" stroke={color.tide} strokeWidth={2} strokeOpacity={0.6} />;
}

interface BinMarkProps {
  plot: PlotArea;
  bin: PlacedBin;
  mark: BinSeries['mark'];
  /** px aside, so that groups in one bin do not lie upon each other. */
  shift: number;
}

function BinMark({ plot, bin, mark, shift }: BinMarkProps) {
  const x = xOf(plot, bin.x) + shift;
  const y = yOf(plot, bin.median);
  const stroke = color.tide;
  return (
    <G>
      <Line
        x1={x}
        x2={x}
        y1={yOf(plot, bin.upper)}
        y2={yOf(plot, bin.lower)}
        stroke={stroke}
        strokeWidth={mark === 'circle' ? 4 : 1.5}
        strokeOpacity={mark === 'circle' ? 0.35 : 1}
      />
      {mark === 'circle' ? (
        <Circle cx={x} cy={y} r={5} fill={color.surface} stroke={stroke} strokeWidth={2} />
      ) : (
        <Rect x={x - 5} y={y - 5} width={10} height={10} fill={stroke} />
      )}
    </G>
  );
}

function BinTable({ title, series, xName, unitX, formatX }: BinChartProps) {
  const rows = series.flatMap(({ label, points }) => points.map((bin) => ({ ...bin, label })));
  const percent = (value: number) => formatNumber(value * 100, { decimals: 1 });
  return (
    <Table
      caption={title}
      rows={rows}
      rowKey={(row) => `${row.label} ${row.from ?? ''}`}
      empty="No bin has at least 5 owners yet."
      columns={[
        { key: 'x', title: `${xName}, ${unitX}`, cell: (row) => binWords(row, formatX) },
        ...(series.length > 1
          ? [{ key: 'group', title: 'Banks', cell: (row: (typeof rows)[number]) => row.label }]
          : []),
        { key: 'median', title: 'Median, %', figures: true, cell: (row) => percent(row.median) },
        {
          key: 'range',
          title: 'Middle 80 %, %',
          figures: true,
          cell: (row) => formatRange(row.lower * 100, row.upper * 100, { decimals: 1 }),
        },
        ...(rows.some(({ model }) => model !== null)
          ? [
              {
                key: 'model',
                title: 'Model, %',
                figures: true,
                cell: (row: (typeof rows)[number]) => (row.model === null ? null : percent(row.model)),
              },
            ]
          : []),
        { key: 'checks', title: 'Checks', figures: true, cell: (row) => formatCount(row.checks) },
        { key: 'owners', title: 'Owners', figures: true, cell: (row) => formatCount(row.owners) },
      ]}
    />
  );
}
