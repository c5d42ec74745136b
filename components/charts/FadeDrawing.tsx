import { memo, useMemo } from 'react';
import Svg, { Circle, G, Line, Path, Rect, Text as SvgText } from 'react-native-svg';
import { color, font, size } from '../theme';
import { Axes } from './Axes';
import { niceTicks, xOf, yOf, type PlotArea } from './chartScale';
import {
  endOfLifeFraction,
  type FadeBin,
  type FadeCheck,
  type FadeClaim,
  fadeParts,
  type FadePoint,
} from './fadeSeries';
import { fadeLabels } from './fadeLabels';
import type { FadeBanks, FadeLife, FadeUnit } from './fadeWords';

export interface FadeDrawingProps {
  plot: PlotArea;
  checks: readonly FadeCheck[];
  bins: readonly FadeBin[];
  curve: readonly FadePoint[];
  reachX: number | null;
  life: FadeLife | null;
  banks: FadeBanks | null;
  claims: readonly FadeClaim[];
  xUnit: FadeUnit;
  xTitle: string;
  yTitle: string;
}

const bandOpacity = { measured: 0.2, projected: 0.09, extrapolated: 0 } as const;
const checkRadius = 2.7;

/** All checks as one path: thousands of separate shapes would make every page with a chart slow. */
const circlesPath = (plot: PlotArea, checks: readonly FadeCheck[]) =>
  checks
    .map(({ x, soh }) => {
      const [left, level] = [(xOf(plot, x) - checkRadius).toFixed(1), yOf(plot, soh).toFixed(1)];
      const arc = `a${checkRadius} ${checkRadius} 0 1 0 ${2 * checkRadius} 0a${checkRadius} ${checkRadius} 0 1 0 ${-2 * checkRadius} 0`;
      return `M${left} ${level}${arc}`;
    })
    .join('');

/** A line through values at x, cut off at the foot of the plot. Many moves a second: no shapes but one path. */
const linePath = (
  plot: PlotArea,
  points: readonly FadePoint[],
  side: 'soh' | 'lower' | 'upper',
  isReversed = false,
): string => {
  const floor = plot.yDomain[0];
  const order = isReversed ? [...points].reverse() : points;
  return order
    .map((point) => `${xOf(plot, point.x).toFixed(1)} ${yOf(plot, Math.max(floor, point[side])).toFixed(1)}`)
    .join('L');
};

const bandPath = (plot: PlotArea, points: readonly FadePoint[]) =>
  `M${linePath(plot, points, 'upper')}L${linePath(plot, points, 'lower', true)}Z`;

const diamond = (x: number, y: number, r = 8) => `M${x} ${y - r}L${x + r} ${y}L${x} ${y + r}L${x - r} ${y}Z`;

/** The drawing itself; what it says stands in words beside it, so it is silent for screen readers. */
export const FadeDrawing = memo(function FadeDrawing(props: FadeDrawingProps) {
  const { plot, checks, bins, curve, reachX, life, banks, claims, xUnit, xTitle, yTitle } = props;
  const parts = fadeParts(curve);
  const circles = useMemo(() => circlesPath(plot, checks), [plot, checks]);
  const level80 = yOf(plot, endOfLifeFraction);
  const foot = plot.height - plot.bottom;
  const edge = plot.width - plot.right;

  return (
    <Svg width={plot.width} height={plot.height} aria-hidden>
      <FadeAxes plot={plot} xUnit={xUnit} xTitle={xTitle} yTitle={yTitle} />
      {parts.map(({ status, points }) => (
        <Path
          key={status}
          d={bandPath(plot, points)}
          fill={color.tide}
          fillOpacity={bandOpacity[status]}
          stroke="none"
        />
      ))}
      <Path
        d={circles}
        fill={color.surface}
        fillOpacity={0.6}
        stroke={color.tide}
        strokeWidth={1}
        strokeOpacity={0.75}
      />
      <Line x1={plot.left} x2={edge} y1={level80} y2={level80} stroke={color.ink} strokeWidth={1.25} />
      {parts.map(({ status, points }) =>
        status === 'extrapolated' ? (
          <G key={status}>
            {(['lower', 'upper'] as const).map((side) => (
              <Path
                key={side}
                d={`M${linePath(plot, points, side)}`}
                fill="none"
                stroke={color.tide}
                strokeWidth={1.5}
                strokeDasharray="1.5 4"
                strokeLinecap="round"
              />
            ))}
          </G>
        ) : (
          <Path
            key={status}
            d={`M${linePath(plot, points, 'soh')}`}
            fill="none"
            stroke={color.tide}
            strokeWidth={2.5}
            strokeDasharray={status === 'projected' ? '7 5' : undefined}
          />
        ),
      )}
      <BinMarks plot={plot} bins={bins} />
      {reachX !== null && <ReachMark plot={plot} curve={curve} reachX={reachX} />}
      {banks && <BanksMark plot={plot} banks={banks} level={level80} />}
      {life && <LifeMark plot={plot} life={life} level={level80} foot={foot} />}
      {claims.map((claim) => {
        const x = Math.min(edge, xOf(plot, claim.x));
        const isBeyond = claim.x > plot.xDomain[1];
        return (
          <G key={`${claim.x} ${claim.label}`}>
            {!isBeyond && (
              <Line x1={x} x2={x} y1={level80 + 8} y2={foot} stroke={color.brass} strokeWidth={1.25} />
            )}
            <Path
              d={
                isBeyond
                  ? `M${edge - 10} ${level80 - 8}L${edge - 1} ${level80}L${edge - 10} ${level80 + 8}`
                  : diamond(x, level80)
              }
              fill={isBeyond ? 'none' : color.surface}
              stroke={color.brass}
              strokeWidth={2.25}
            />
          </G>
        );
      })}
      {fadeLabels(props).map((label) => (
        <SvgText
          key={label.id}
          x={label.x}
          y={label.y}
          textAnchor={label.anchor}
          fontFamily={font.words}
          fontSize={size.small}
          fontWeight={label.isStrong ? '600' : '400'}
          fill={color[label.tone]}
          stroke={color.surface}
          strokeWidth={3}
          // The ground shows around the letters, so that lines below do not cut through them.
          {...{ paintOrder: 'stroke' }}
        >
          {label.text}
        </SvgText>
      ))}
    </Svg>
  );
});

/** The axes stand still while a curve moves. */
const FadeAxes = memo(function FadeAxes({
  plot,
  xUnit,
  xTitle,
  yTitle,
}: Pick<FadeDrawingProps, 'plot' | 'xUnit' | 'xTitle' | 'yTitle'>) {
  return (
    <Axes
      plot={plot}
      xTicks={niceTicks(plot.xDomain, plot.width < 480 ? 4 : 8)}
      yTicks={niceTicks(plot.yDomain, 5)}
      xTitle={xTitle}
      yTitle={yTitle}
      formatX={(value) => (xUnit === 'years' ? String(value) : value.toLocaleString('en-GB'))}
      formatY={(value) => String(Math.round(value * 100))}
    />
  );
});

/** Medians as filled squares on the line of their middle 80 %: raw readings, told apart from circles by their shape. */
const BinMarks = memo(function BinMarks({ plot, bins }: Pick<FadeDrawingProps, 'plot' | 'bins'>) {
  return (
    <G>
      {bins.map(({ from, to, median, lower, upper }) => {
        const x = xOf(plot, (from + to) / 2);
        const y = yOf(plot, median);
        return (
          <G key={from}>
            <Line
              x1={x}
              x2={x}
              y1={yOf(plot, upper)}
              y2={yOf(plot, Math.max(lower, plot.yDomain[0]))}
              stroke={color.ink}
              strokeWidth={1.5}
            />
            <Rect
              x={x - 3.5}
              y={y - 3.5}
              width={7}
              height={7}
              fill={color.ink}
              stroke={color.surface}
              strokeWidth={1}
            />
          </G>
        );
      })}
    </G>
  );
});

function ReachMark({ plot, curve, reachX }: { plot: PlotArea; curve: readonly FadePoint[]; reachX: number }) {
  const point = curve.filter((one) => one.x <= reachX).at(-1);
  if (!point) return null;
  const x = xOf(plot, reachX);
  const y = yOf(plot, point.soh);
  return <Line x1={x} x2={x} y1={y - 8} y2={y - 34} stroke={color.ink} strokeWidth={1.25} />;
}

/** The range of banks lies along the 80 % line, with an end where it is on the chart. */
function BanksMark({ plot, banks, level }: { plot: PlotArea; banks: FadeBanks; level: number }) {
  const edge = plot.width - plot.right;
  const [from, to] = [xOf(plot, banks.lower), Math.min(edge, xOf(plot, banks.upper))];
  const ends = banks.upper > plot.xDomain[1] ? [from] : [from, to];
  return (
    <G>
      <Line
        x1={from}
        x2={to}
        y1={level}
        y2={level}
        stroke={color.tide}
        strokeWidth={5}
        strokeOpacity={0.45}
      />
      {ends.map((x) => (
        <Line key={x} x1={x} x2={x} y1={level - 5} y2={level + 5} stroke={color.tide} strokeWidth={1.25} />
      ))}
    </G>
  );
}

function LifeMark({
  plot,
  life,
  level,
  foot,
}: {
  plot: PlotArea;
  life: FadeLife;
  level: number;
  foot: number;
}) {
  const x = xOf(plot, life.estimate);
  if (life.status === 'extrapolated') {
    const [from, to] = [xOf(plot, life.lower), Math.min(plot.width - plot.right, xOf(plot, life.upper))];
    return (
      <Line
        x1={from}
        x2={to}
        y1={level}
        y2={level}
        stroke={color.tide}
        strokeWidth={4}
        strokeDasharray="1 6"
        strokeLinecap="round"
      />
    );
  }
  return (
    <>
      <Line
        x1={x}
        x2={x}
        y1={level + 6}
        y2={foot}
        stroke={color.tide}
        strokeWidth={1.5}
        strokeDasharray="2 3"
      />
      <Circle cx={x} cy={level} r={5.5} fill={color.surface} stroke={color.tide} strokeWidth={2.5} />
    </>
  );
}
