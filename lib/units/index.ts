export { convert, isConvertible, isUnit, pressureKPaOf, units } from './quantities';
export type { Unit } from './quantities';
export { cRateIt, currentOfIt } from './cRate';
export { clockOfDuration, parseDuration } from './durations';
export { parseNumber } from './parseNumber';
export {
  enDash,
  formatCount,
  formatDuration,
  formatNumber,
  formatPercent,
  formatQuantity,
  formatRange,
  formatUncertainty,
  formatYears,
  minusSign,
  noValue,
  thinSpace,
} from './numbers';
export type { NumberFormatOptions } from './numbers';
export { currencyDecimals, formatMoney, formatSmallMoney, minorUnitsOf } from './money';
export {
  addMonths,
  calendarDateOf,
  daysBetween,
  formatAgo,
  formatDate,
  formatInstant,
  formatMonth,
  isCalendarDate,
  isCalendarMonth,
  yearsBetween,
} from './dates';
