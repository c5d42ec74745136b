export { decodeSniff } from './log/decodeSniff';
export type { SniffedEncoding, TextEncodingName } from './log/decodeSniff';
export { quantityLabels, recogniseColumns } from './log/recogniseColumns';
export type { LogQuestion, RecognisedColumn, RecognisedColumns } from './log/recogniseColumns';
export { createLogReader } from './log/logReader';
export type { LogReader, LogReaderOptions } from './log/logReader';
export { integrateLog } from './log/integrateLog';
export type { IntegrateLogOptions } from './log/integrateLog';
export { joinLogs } from './log/joinLogs';
export type { LogFile } from './log/joinLogs';
export { logQuantities, timeFormatLabels } from './log/logTypes';
export type {
  LogFailure,
  LogFailureReason,
  LogMapping,
  LogQuantity,
  LogResult,
  LogSamples,
  LogSeries,
  LogWarning,
  TimeFormat,
} from './log/logTypes';
export { computeCheck, normaliseCheck } from './computeCheck';
export type { ComputedCheck, LogFigures, NormalisedCheck, ReadingValues, TestedBank } from './computeCheck';
export { normaliseCapacity } from './normaliseCapacity';
export type { NormalisedCapacity } from './normaliseCapacity';
export { budgetOf, combineInQuadrature, coverageFactor, rectangularSd } from './combineUncertainty';
export type { BudgetPart } from './combineUncertainty';
export { budgetPartLabels } from './uncertaintyBudget';
export type { UncertaintyBudget } from './uncertaintyBudget';
export { defaultSettings } from './measureSettings';
export type { MeasureSettings } from './measureSettings';
export { usualMeanCellV } from './usualCellVoltage';
export { equivalentCycles, flaggedDisagreement } from './equivalentCycles';
export type { CycleSources, EquivalentCycles } from './equivalentCycles';
export { conditionsToDate, socMeanOf } from './conditionsToDate';
export type { ConditionsToDate, PeriodConditions } from './conditionsToDate';
export { depthFromEnergy, rateFromPower, usualInverterFraction } from './estimates/useOfBank';
export type { BankSize } from './estimates/useOfBank';
export { climateBandsC, usualCellTemperatureC, usualTemperatureOffK } from './estimates/usualCellTemperature';
export type { ClimateBand, Standing } from './estimates/usualCellTemperature';
export { chargeWindowOffFraction, chargeWindowOfLimits } from './estimates/chargeWindow';
export type { CellLimits, ChargeWindow, ChargeWindowResult } from './estimates/chargeWindow';
export {
  clampForceOfSprings,
  clampForceOfTorque,
  torqueOffFraction,
  usualNutFactor,
} from './estimates/clampForce';
export type { CompressedSprings, TightenedRods } from './estimates/clampForce';
