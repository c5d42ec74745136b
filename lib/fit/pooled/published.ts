/**
 * The part of the pooled fit that pages may load: lives, fade and labels from a published fit, without the estimator
 * and its numeric packages.
 */
export { capacityAt, fadeAt, lifeAt, type LifeOptions } from './life';
export { predictNewCheck } from './newCheck';
export {
  averageFigure,
  efcPerYearOf,
  figureAt,
  fitUse,
  lifeFigureAt,
  type CurveFigure,
  type Figure,
  type HomeUse,
  type LifeFigure,
} from './figures';
export { claimFigureAt, type CataloguedClaim, type ClaimFigure } from './claims';
export { labelAtYourUse, type LabelAtUse, type LabelClaim } from './label';
export { leverMoves, verdictInWords, type Effect, type EffectLever, type Verdict } from './effects';
export { calendarShareAt } from './banksAt';
export { outlast, type Outlast } from './outlast';
export { typicalFade, type TypicalFade } from './typicalFade';
export { defaultScenarios, type Scenario, type Use } from './use';
export type {
  CellTypeRow,
  ConditionName,
  OutsidePool,
  PooledLife,
  PooledLifeStatus,
  PublishedFit,
  Ranged,
  Reach,
} from './types';
