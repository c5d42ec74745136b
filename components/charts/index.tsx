import type { ComponentType } from 'react';
import { onDemand } from '../onDemand';
import { OfflineState } from '../ui';
import { ChartSkeleton } from './ChartSkeleton';
import type * as Drawings from './drawings';
import type { BandLineChartProps } from './BandLineChart';
import type { BinChartProps } from './BinChart';
import type { CompareChartProps } from './CompareChart';
import type { FadeChartProps } from './FadeChart';
import type { GrowthChartProps } from './GrowthChart';
import {
  bandLineHeight,
  binHeight,
  fadeHeight,
  growthHeight,
  historyHeight,
  logPanelHeight,
  survivalHeight,
} from './heights';
import type { HistoryChartProps } from './HistoryChart';
import type { LogChartProps } from './LogChart';
import type { SurvivalChartProps } from './SurvivalChart';

// The drawing library comes with the first chart that is shown, so that pages without one do not pay for it.
const drawings = onDemand(() => import('./drawings'));

// Controls, readings and the foot stand around a drawing, inside the frame's padding.
const frameHeight = 160;

const chart = <Props extends object>(
  pick: (all: typeof Drawings) => ComponentType<Props>,
  drawingHeight: number,
): ComponentType<Props> =>
  drawings.component(pick, {
    loading: <ChartSkeleton height={drawingHeight + frameHeight} />,
    failed: (retry) => <OfflineState {...retry} />,
  });

export const BandLineChart = chart<BandLineChartProps>((all) => all.BandLineChart, bandLineHeight);
export const BinChart = chart<BinChartProps>((all) => all.BinChart, binHeight);
export const CompareChart = chart<CompareChartProps>((all) => all.CompareChart, fadeHeight);
export const FadeChart = chart<FadeChartProps>((all) => all.FadeChart, fadeHeight);
export const LogChart = chart<LogChartProps>((all) => all.LogChart, 2 * logPanelHeight);
export const GrowthChart = chart<GrowthChartProps>((all) => all.GrowthChart, growthHeight);
export const HistoryChart = chart<HistoryChartProps>((all) => all.HistoryChart, historyHeight);
export const SurvivalChart = chart<SurvivalChartProps>((all) => all.SurvivalChart, survivalHeight);

export type { BinChartProps, FadeChartProps, HistoryChartProps, LogChartProps, SurvivalChartProps };
export type { BandMark, BandPoint } from './bandLine';
export type { BinPoint, BinSeries } from './binSeries';
export type { ComparedCurve } from './compareSeries';
export type { FadeBin, FadeCheck, FadeClaim, FadePoint, FadeStatus } from './fadeSeries';
export type { FadeBanks, FadeLife, FadeUnit } from './fadeWords';
export type { ExpectedBand, HistoryCheck } from './historySeries';
export type { GrowthBand } from './growthSeries';
export type { LogSeries } from './logSeries';
