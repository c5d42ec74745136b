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
export { type FadeAtReference } from './atReference';
export { looResiduals, type Residual } from './residuals';
export { modelCurve, stratify, type StratifiedCell, type StratifiedGroup } from './stratified';
export { matchedContrast, type MatchedContrast } from './matched';
export { covariateBalance, type BalanceRow } from './balance';
export { type Interaction, type InteractionLever } from './interactions';
export { type BankInfluence } from './influence';
export { defaultPriors, priorsWith, type Prior } from './priors';
export { parameterNames, type ParameterName } from './parameters';
export { maxChecksPerBank, type PoolProblem } from './validate';
export * from './published';
export { banksAt } from './banksAt';
export { bankPosterior, checkUse, type BankPosterior } from './bankPosterior';
export { forecastOf, standingOf, type BankForecast, type BankStanding } from './standing';
export { contrastUses, stretchOf, verdictOf, type InputReliability } from './effects';
export { outsideOf, reachOfUse, statusOf } from './support';
