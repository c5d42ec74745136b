import { useMemo, type ReactNode } from 'react';
import { View } from 'react-native';
import Svg, { Circle, G, Text as SvgText } from 'react-native-svg';
import { VictoryArea, VictoryLine } from 'victory-native';
import { color, font, size } from '../theme';
import { Quiet } from '../ui';
import { Axes, frameOf } from './Axes';
import { bandDomain, type BandMark, type BandPoint } from './bandLine';
import { ChartFrame } from './ChartFrame';
import { niceTicks, xOf, yOf, type PlotArea } from './chartScale';
import { bandLineHeight } from './heights';
import { placeLabels } from './placeLabels';
import { ReadingLayer } from './ReadingLayer';

export interface BandLineChartProps {
  title: string;
  points: readonly BandPoint[];
  marks: readonly BandMark[];
  xTitle: string;
  yTitle: string;
  formatX: (x: number) => string;
  formatY: (y: number) => string;
  /** One sentence on what is seen, for everyone. */
  finding: string;
  table: () => ReactNode;
  computed?: ReactNode;
}

/** One figure over another as a curve in its range, with named places on it. */
export function BandLineChart(props: BandLineChartProps) {
  const { title, points, finding, table, computed } = props;
  return (
    <ChartFrame
      title={title}
      hasHeading
      summary={[`${title}.`, finding, ...points.map(({ reading }) => `${reading}.`)].join(' ')}
      height={bandLineHeight + 40}
      table={table}
      computed={computed}
    >
      {(width) => <SizedBandLine {...props} width={width} />}
    </ChartFrame>
  );
}

function SizedBandLine({
  width,
  title,
  points,
  marks,
  finding,
  ...words
}: BandLineChartProps & { width: number }) {
  const plot = useMemo<PlotArea>(() => {
    const { x, y } = bandDomain(points, marks);
    return {
      width,
      height: bandLineHeight,
      left: 52,
      right: 18,
      top: 34,
      bottom: 46,
      xDomain: x,
      yDomain: y,
    };
  }, [width, points, marks]);
  const frame = frameOf(plot);
  return (
    <View>
      <Svg width={width} height={bandLineHeight} aria-hidden>
        <VictoryArea
          {...frame}
          data={points.map(({ x, lower, upper }) => ({ x, y: upper, y0: lower }))}
          style={{ data: { fill: color.tide, fillOpacity: 0.14, stroke: 'none' } }}
        />
        <Axes
          plot={plot}
          xTicks={niceTicks(plot.xDomain, width < 480 ? 4 : 8)}
          yTicks={niceTicks(plot.yDomain, 5)}
          {...words}
        />
        <VictoryLine
          {...frame}
          data={points.map(({ x, y }) => ({ x, y }))}
          style={{ data: { stroke: color.tide, strokeWidth: 2.5 } }}
        />
        <Marks plot={plot} marks={marks} />
      </Svg>
      <ReadingLayer
        label={title}
        readings={points.map(({ x, y, reading }) => ({
          x: xOf(plot, x),
          marks: [{ y: yOf(plot, y), tone: 'tide' }],
          text: reading,
        }))}
        width={width}
        height={bandLineHeight}
        top={plot.top}
        bottom={bandLineHeight - plot.bottom}
      />
      <Quiet tone="ink">{finding}</Quiet>
    </View>
  );
}

function Marks({ plot, marks }: { plot: PlotArea; marks: readonly BandMark[] }) {
  const placed = placeLabels(
    marks.map(({ x, y, label }) => ({
      id: label,
      text: label,
      x: xOf(plot, x),
      y: yOf(plot, y),
      fontSize: size.small,
      offsets: [
        { dx: 0, dy: -12, anchor: 'middle' as const },
        { dx: 10, dy: -8, anchor: 'start' as const },
        { dx: -10, dy: -8, anchor: 'end' as const },
        { dx: 0, dy: 22, anchor: 'middle' as const },
      ],
    })),
    { x: plot.left, y: 0, width: plot.width - plot.left, height: plot.height - plot.bottom },
    [],
  );
  return (
    <G>
      {marks.map(({ x, y, label }) => (
        <Circle
          key={label}
          cx={xOf(plot, x)}
          cy={yOf(plot, y)}
          r={5}
          fill={color.surface}
          stroke={color.ink}
          strokeWidth={2}
        />
      ))}
      {placed.map((label) => (
        <SvgText
          key={label.id}
          x={label.x}
          y={label.y}
          textAnchor={label.anchor}
          fontFamily={font.words}
          fontSize={size.small}
          fontWeight="600"
          fill={color.ink}
        >
          {label.text}
        </SvgText>
      ))}
    </G>
  );
}
