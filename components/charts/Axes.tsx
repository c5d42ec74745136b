import { Text as SvgText } from 'react-native-svg';
import { VictoryAxis } from 'victory-native';
import { color, font, size } from '../theme';
import type { PlotArea } from './chartScale';

export const tickStyle = { fontFamily: font.figures, fontSize: size.small, fill: color.quiet };
const titleStyle = { fontFamily: font.words, fontSize: size.small, fill: color.quiet };

/** What victory's parts need to agree on one drawing. */
export const frameOf = (plot: PlotArea) => ({
  standalone: false,
  width: plot.width,
  height: plot.height,
  padding: { left: plot.left, right: plot.right, top: plot.top, bottom: plot.bottom },
  domain: { x: [...plot.xDomain] as [number, number], y: [...plot.yDomain] as [number, number] },
});

export interface AxesProps {
  plot: PlotArea;
  xTicks: readonly number[];
  yTicks: readonly number[];
  xTitle?: string;
  yTitle: string;
  formatX: (value: number) => string;
  formatY: (value: number) => string;
}

/** Both axes with their titles: the upright one's above its ticks, the level one's at its end. */
export function Axes({ plot, xTicks, yTicks, xTitle, yTitle, formatX, formatY }: AxesProps) {
  const frame = frameOf(plot);
  return (
    <>
      <VictoryAxis
        {...frame}
        dependentAxis
        tickValues={[...yTicks]}
        tickFormat={formatY}
        style={{
          axis: { stroke: 'none' },
          grid: { stroke: color.line, strokeWidth: 1 },
          ticks: { stroke: 'none', size: 2 },
          tickLabels: { ...tickStyle, padding: 6 },
        }}
      />
      <VictoryAxis
        {...frame}
        tickValues={[...xTicks]}
        tickFormat={formatX}
        // The level axis stays at the lower edge whether or not the values reach 0.
        offsetY={plot.bottom}
        style={{
          axis: { stroke: color.line, strokeWidth: 1 },
          grid: { stroke: 'none' },
          ticks: { stroke: 'none', size: 2 },
          tickLabels: { ...tickStyle, padding: 6 },
        }}
      />
      <SvgText {...titleStyle} x={plot.left} y={plot.top - 10} textAnchor="start">
        {yTitle}
      </SvgText>
      {xTitle && (
        <SvgText {...titleStyle} x={plot.width - plot.right} y={plot.height - 4} textAnchor="end">
          {xTitle}
        </SvgText>
      )}
    </>
  );
}
