/** What a column of a log can hold. Two columns of `time` (a day and a clock) are read as one stamp. */
export const logQuantities = [
  'time',
  'voltage',
  'current',
  'power',
  'temperature',
  'lowestCell',
  'highestCell',
  'cell',
  'counter',
] as const;
/** `cell` is one cell's voltage (several columns give the lowest and the highest); `counter` a running Ah count. */
export type LogQuantity = (typeof logQuantities)[number];

/** How stamps are written, in the words a form can show. */
export const timeFormatLabels = {
  ymd: 'date and time, year first',
  dmy: 'date and time, day first',
  mdy: 'date and time, month first',
  clock: 'time of day',
  elapsedClock: 'time since the start, as h:min:s',
  elapsedMs: 'milliseconds since the start',
  elapsedS: 'seconds since the start',
  elapsedMin: 'minutes since the start',
  elapsedH: 'hours since the start',
  epochS: 'seconds since 1970',
  epochMs: 'milliseconds since 1970',
  serialDays: 'days since 1900, as spreadsheets count',
} as const;
export type TimeFormat = keyof typeof timeFormatLabels;

/** How the columns of a log are read. `index` and `headerLine` (the last line above the rows)
 * count from 0; a `headerLine` of -1 means none. */
export interface LogMapping {
  delimiter: ',' | ';' | '\t';
  decimal: '.' | ',';
  headerLine: number;
  columns: { index: number; quantity: LogQuantity; unit: string }[];
  timeFormat: string;
  /** Part of the log to use, in seconds from its first stamp; without it the discharge is looked for. */
  window?: { startS: number; endS: number } | null;
  /** Sign of the current while discharging; `auto` lets the voltage tell. */
  dischargeSign?: 'auto' | 'positive' | 'negative';
  /** Whether the charge in a gap is counted from the readings at its ends, or left out. */
  gaps?: 'count' | 'leaveOut';
}

/** Reasons why a log gives no result; all are expected and worded for its owner. */
export type LogFailureReason =
  | 'empty'
  | 'binary'
  | 'wrongEncoding'
  | 'noTable'
  | 'delimiterUnclear'
  | 'badMapping'
  | 'noTimeColumn'
  | 'noCurrentColumn'
  | 'unreadableTime'
  | 'unreadableRows'
  | 'lineTooLong'
  | 'tooManyRows'
  | 'tooFewRows'
  | 'filesDiffer'
  | 'filesUnordered'
  | 'signUnclear'
  | 'noDischarge'
  | 'badWindow';

/** An expected failure. `row` is the line in the file counted from 1, `column` the column counted from 1. */
export interface LogFailure {
  ok: false;
  reason: LogFailureReason;
  message: string;
  row?: number;
  column?: number;
}

/** A remark on a log that was read all the same. */
export interface LogWarning {
  code: string;
  text: string;
  count?: number;
  /** Line in the file, counted from 1. */
  atRow?: number;
}

/** Readings of a log, one entry per usable row; a channel the log does not have is null, a missing value NaN. */
export interface LogSamples {
  ok: true;
  /** Seconds on the format's own scale, as written (not yet put in order). */
  timeS: Float64Array;
  currentA: Float64Array;
  voltageV: Float64Array | null;
  powerW: Float64Array | null;
  temperatureC: Float64Array | null;
  lowestCellV: Float64Array | null;
  highestCellV: Float64Array | null;
  counterAh: Float64Array | null;
  /** Line of each reading in the file, counted from 1. */
  row: Int32Array;
  timeFormat: TimeFormat;
  rowsRead: number;
  rowsSkipped: number;
  warnings: LogWarning[];
}

/** A log integrated (calculation 1), of the whole bank. Times are seconds from the log's first stamp. */
export interface LogResult {
  ok: true;
  capacityAh: number;
  /** Null without a voltage or power column. */
  energyWh: number | null;
  /** Mean over the time under load, pauses left out. */
  meanCurrentA: number;
  meanTemperatureC: number | null;
  startTemperatureC: number | null;
  endTemperatureC: number | null;
  startVoltageV: number | null;
  /** Voltages at the end are the last under load, before it was taken off. */
  endVoltageV: number | null;
  /** Cells before the load was put on. */
  lowestCellAtStartV: number | null;
  highestCellAtStartV: number | null;
  /** Cells at the end of the charge before, if the log begins early enough. */
  lowestCellAtFullV: number | null;
  highestCellAtFullV: number | null;
  lowestCellAtEndV: number | null;
  highestCellAtEndV: number | null;
  /** Length of the window, pauses included. */
  durationS: number;
  /** Time under load. */
  dischargingS: number;
  windowStartS: number;
  windowEndS: number;
  /** First stamp as an instant, its clock read as UTC; null where the log has no dates. */
  firstStamp: string | null;
  rowsRead: number;
  rowsUsed: number;
  rowsSkipped: number;
  legs: number;
  /** Share of the capacity that was counted across gaps. */
  gapChargeFraction: number;
  /** Share of the capacity counted across the largest gap. */
  largestGapFraction: number;
  /** Relative standard uncertainty that the gaps bring. */
  gapRelSd: number;
  warnings: LogWarning[];
  series: LogSeries;
}

/** A log thinned for drawing: at most 600 points that keep the extremes of voltage and current. */
export interface LogSeries {
  timeS: number[];
  voltageV: (number | null)[];
  currentA: number[];
  temperatureC: (number | null)[];
}

/** Shorthand for an expected failure. */
export const logFailure = (
  reason: LogFailureReason,
  message: string,
  where: { row?: number; column?: number } = {},
): LogFailure => ({ ok: false, reason, message, ...where });
