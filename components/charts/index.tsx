import { lazy, Suspense, type ComponentType } from 'react';
import { ChartSkeleton } from './ChartSkeleton';
import type { FadeChartProps } from './FadeChart';
import { fadeHeight, historyHeight, logPanelHeight } from './heights';
import type { HistoryChartProps } from './HistoryChart';
import type { LogChartProps } from './LogChart';

// The drawing library comes with the first chart that is shown, so that pages without one do not pay for it.
const LazyFadeChart = lazy(() => import('./drawings').then((all) => ({ default: all.FadeChart })));
const LazyLogChart = lazy(() => import('./drawings').then((all) => ({ default: all.LogChart })));
const LazyHistoryChart = lazy(() => import('./drawings').then((all) => ({ default: all.HistoryChart })));

// Controls, readings and the foot stand around a drawing, inside the frame's padding.
const frameHeight = 160;

function afterLoading<Props extends object>(Chart: ComponentType<Props>, drawingHeight: number) {
  return function LoadedChart(props: Props) {
    return (
      <Suspense fallback={<ChartSkeleton height={drawingHeight + frameHeight} />}>
        <Chart {...props} />
      </Suspense>
    );
  };
}

export const FadeChart = afterLoading<FadeChartProps>(LazyFadeChart, fadeHeight);
export const LogChart = afterLoading<LogChartProps>(LazyLogChart, 2 * logPanelHeight);
export const HistoryChart = afterLoading<HistoryChartProps>(LazyHistoryChart, historyHeight);

export type { FadeChartProps, HistoryChartProps, LogChartProps };
export type { FadeCheck, FadeClaim, FadePoint, FadeStatus } from './fadeSeries';
export type { FadeLife, FadeUnit } from './fadeWords';
export type { ExpectedBand, HistoryCheck } from './historySeries';
export type { LogSeries } from './logSeries';
