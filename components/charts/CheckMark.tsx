import { Circle, G, Line, Rect } from 'react-native-svg';
import { color } from '../theme';
import { xOf, yOf, type PlotArea } from './chartScale';
import type { HistoryCheck } from './historySeries';

/** One check of a bank with the bar of its uncertainty. */
export function CheckMark({ plot, check }: { plot: PlotArea; check: HistoryCheck }) {
  const [x, y] = [xOf(plot, check.x), yOf(plot, check.soh)];
  const tone = check.remark ? color.rust : check.isLeftOut ? color.quiet : color.tide;
  const ends = [yOf(plot, check.soh + check.plusMinus), yOf(plot, check.soh - check.plusMinus)] as const;
  return (
    <G>
      <Line
        x1={x}
        x2={x}
        y1={ends[0]}
        y2={ends[1]}
        stroke={tone}
        strokeWidth={1.5}
        strokeDasharray={check.isLeftOut ? '2 3' : undefined}
      />
      {check.remark ? (
        <Rect x={x - 5} y={y - 5} width={10} height={10} fill={color.rust} />
      ) : (
        <Circle
          cx={x}
          cy={y}
          r={4.5}
          fill={color.surface}
          stroke={tone}
          strokeWidth={2}
          strokeDasharray={check.isLeftOut ? '2 2' : undefined}
        />
      )}
    </G>
  );
}
