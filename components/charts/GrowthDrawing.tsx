import { useMemo } from 'react';
import { View } from 'react-native';
import Svg, { G, Line, Text as SvgText } from 'react-native-svg';
import { VictoryArea, VictoryLine } from 'victory-native';
import { formatNumber } from '@/lib/units';
import { color, font, size } from '../theme';
import { Axes, frameOf } from './Axes';
import { CheckMark } from './CheckMark';
import { niceTicks, xOf, yOf, type PlotArea } from './chartScale';
import { endOfLifeFraction, type FadeStatus } from './fadeSeries';
import type { GrowthChartProps } from './GrowthChart';
import {
  type GrowthBand,
  growthDomain,
  growthLines,
  growthParts,
  growthReadings,
  percentLabel,
  spreadLabels,
} from './growthSeries';
import { growthHeight } from './heights';
import { joinedChecks } from './historySeries';
import { textWidth } from './placeLabels';
import { ReadingLayer } from './ReadingLayer';

type GrowthDrawingProps = Pick<GrowthChartProps, 'title' | 'unit' | 'checks' | 'bands'> & { width: number };

const outer = [0, 4] as const;
const inner = [1, 3] as const;
const dashes: Record<FadeStatus, string | undefined> = {
  measured: undefined,
  projected: '7 5',
  extrapolated: '1.5 4',
};
const opacities: Record<FadeStatus, number> = { measured: 0.14, projected: 0.09, extrapolated: 0.05 };

/** The drawing of a growth chart at its width. */
export function GrowthDrawing({ width, title, unit, checks, bands }: GrowthDrawingProps) {
  const plot = useMemo<PlotArea>(() => {
    const { x, y } = growthDomain(checks, bands);
    return { width, height: growthHeight, left: 40, right: 40, top: 50, bottom: 46, xDomain: x, yDomain: y };
  }, [width, checks, bands]);
  const frame = frameOf(plot);
  const joined = joinedChecks(checks);
  const long = `capacity left, % of rated (from ${Math.round(plot.yDomain[0] * 100)} %)`;
  const yTitle = textWidth(long, size.small) > width - 150 ? 'capacity left, %' : long;
  const level = yOf(plot, endOfLifeFraction);
  return (
    <View>
      <Svg width={width} height={growthHeight} aria-hidden>
        {growthParts(bands).map((part) => (
          <Band key={part.status} {...part} frame={frame} />
        ))}
        <Axes
          plot={plot}
          xTicks={niceTicks(plot.xDomain, 6)}
          yTicks={niceTicks(plot.yDomain, 5)}
          xTitle={unit === 'years' ? 'years since first use' : 'full cycles since new'}
          yTitle={yTitle}
          formatX={(value) => formatNumber(value)}
          formatY={percentLabel}
        />
        <Line
          x1={plot.left}
          x2={plot.width - plot.right}
          y1={level}
          y2={level}
          stroke={color.ink}
          strokeWidth={1}
        />
        <LineNames plot={plot} bands={bands} />
        {joined.length > 1 && (
          <VictoryLine
            {...frame}
            data={joined.map((check) => ({ x: check.x, y: check.soh }))}
            style={{ data: { stroke: color.tide, strokeWidth: 2 } }}
          />
        )}
        {checks.map((check) => (
          <CheckMark key={check.id} plot={plot} check={check} />
        ))}
      </Svg>
      <ReadingLayer
        label={title}
        readings={growthReadings(checks, bands, unit).map(({ x, text }) => ({
          x: xOf(plot, x),
          marks: [],
          text,
        }))}
        width={width}
        height={growthHeight}
        top={plot.top}
        bottom={growthHeight - plot.bottom}
      />
    </View>
  );
}

interface BandProps {
  status: FadeStatus;
  points: readonly GrowthBand[];
  frame: ReturnType<typeof frameOf>;
}

function Band({ status, points, frame }: BandProps) {
  return (
    <G>
      {[outer, inner].map(([low, high]) => (
        <VictoryArea
          key={low}
          {...frame}
          data={points.map(({ x, quantiles }) => ({ x, y: quantiles[high]!, y0: quantiles[low]! }))}
          style={{ data: { fill: color.tide, fillOpacity: opacities[status], stroke: 'none' } }}
        />
      ))}
      {growthLines.map((line, i) => (
        <VictoryLine
          key={line}
          {...frame}
          data={points.map(({ x, quantiles }) => ({ x, y: quantiles[i]! }))}
          style={{
            data: {
              stroke: color.quiet,
              strokeWidth: line === '50' ? 1.75 : 0.75,
              strokeDasharray: dashes[status],
            },
          }}
        />
      ))}
    </G>
  );
}

/** The lines' names at their ends, and above them what they count. */
function LineNames({ plot, bands }: { plot: PlotArea; bands: readonly GrowthBand[] }) {
  const last = bands.at(-1);
  if (!last) return null;
  const heights = spreadLabels(
    last.quantiles.map((quantile) => yOf(plot, quantile) + 4),
    14,
  );
  const style = { fontSize: size.small, fill: color.quiet };
  return (
    <G>
      <SvgText {...style} fontFamily={font.words} x={plot.width - 2} y={16} textAnchor="end">
        % of banks below
      </SvgText>
      {growthLines.map((line, i) => (
        <SvgText
          key={line}
          {...style}
          fontFamily={font.figures}
          x={plot.width - plot.right + 8}
          y={heights[i]}
        >
          {line}
        </SvgText>
      ))}
    </G>
  );
}
