export type { PoolCheck } from './poolCheck';
export { cohenKappa, type Kappa } from './agreement/cohenKappa';
export { allBands, bandsByLever, type Band, type BandLever } from './bands';
export { fitCurve, type FitCurveOptions } from './curve/fitCurve';
export { fitSeries, type SeriesFit, type SeriesPoint } from './curve/fitSeries';
export {
  fitStrata,
  stratumKey,
  type FitStrataOptions,
  type FitStrataResult,
  type StratumCurve,
} from './curve/fitStrata';
export { lifeAtUse, type LifeAtUse } from './curve/lifeAtUse';
export { statusAt } from './curve/status';
export type {
  CurveFit,
  CurvePoint,
  CurveRefusal,
  CurveRefusalReason,
  CurveResult,
  LifeStatus,
  RangedFigure,
} from './curve/types';
export type { ValueSource } from './poolCheck';
export * from './pooled';
export { crossingsOf } from './survival/crossings';
export { countFailures, failureRate, type FailureCount, type FailureRate } from './survival/failureRate';
export { kaplanMeier, survivalQuantile } from './survival/kaplanMeier';
export { turnbull, turnbullSurvival } from './survival/turnbull';
export { weibull, weibullQuantile, weibullSurvival } from './survival/weibull';
