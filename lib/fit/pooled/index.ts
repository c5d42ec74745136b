export { fitPool } from './fitPool';
export type {
  ClampingClass,
  FitPoolOptions,
  FitPoolResult,
  FitRefusal,
  ParameterRow,
  PooledFit,
  ScreenRow,
} from './fitTypes';
export { capacityAt, fadeAt, lifeAt, type LifeOptions } from './life';
export { predictNewCheck } from './newCheck';
export { labelAtYourUse, type LabelAtUse, type LabelClaim } from './label';
export { looResiduals, type Residual } from './residuals';
export { modelCurve, stratify, type StratifiedCell, type StratifiedGroup } from './stratified';
export { matchedContrast, type MatchedContrast } from './matched';
export { covariateBalance, type BalanceRow } from './balance';
export { leverMoves, verdictInWords, type Effect, type EffectLever, type Verdict } from './effects';
export { type Interaction, type InteractionLever } from './interactions';
export { type BankInfluence } from './influence';
export { defaultPriors, priorsWith, type Prior } from './priors';
export { parameterNames, type ParameterName } from './parameters';
export { defaultScenarios, type Scenario, type Use } from './use';
export { maxChecksPerBank, type PoolProblem } from './validate';
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
