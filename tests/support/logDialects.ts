import { createLogReader, integrateLog, recogniseColumns } from '@/lib/measure';
import type { IntegrateLogOptions, LogFailure, LogMapping, LogResult } from '@/lib/measure';

/** One reading of a made-up discharge, discharging positive. */
export interface Reading {
  timeS: number;
  currentA: number;
  voltageV: number;
  temperatureC: number;
  lowestCellV: number;
  highestCellV: number;
}

/**
 * A made-up discharge of a 16-cell bank: five minutes of rest, an hour at 56 A, five minutes of rest. The voltage falls
 * in a straight line under load, so that charge and energy have closed forms.
 */
export function plainDischarge(stepS = 10): Reading[] {
  const readings: Reading[] = [];
  for (let timeS = 0; timeS <= 4200; timeS += stepS) {
    const isLoaded = timeS >= 300 && timeS <= 3900;
    const share = Math.min(1, Math.max(0, (timeS - 300) / 3600));
    const cellV = 3.4 - 0.6 * share;
    readings.push({
      timeS,
      currentA: isLoaded ? 56 : 0,
      voltageV: 16 * cellV,
      temperatureC: 20 + 5 * share,
      lowestCellV: cellV - 0.01,
      highestCellV: cellV + 0.02,
    });
  }
  return readings;
}

/** Charge of `plainDischarge`, Ah: the hour, and the ramps to and from the rows of rest beside it. */
export const plainChargeAh = (stepS = 10) => 56 + (56 * stepS) / 3600;

/** How a log is written. A column writes one field of a row. */
export interface Dialect {
  delimiter: string;
  decimal?: ',' | '.';
  preamble?: string[];
  header: string[] | null;
  unitRow?: string[];
  columns: ((reading: Reading) => string | number)[];
  lineEnd?: string;
}

/** Writes readings in a dialect. */
export function writeLog(readings: Reading[], dialect: Dialect): string {
  const { delimiter, decimal = '.', preamble = [], header, unitRow, columns, lineEnd = '\n' } = dialect;
  const text = (value: string | number) =>
    typeof value === 'string' ? value : String(Number(value.toFixed(5))).replace('.', decimal);
  const lines = [
    ...preamble,
    ...(header ? [header.join(delimiter)] : []),
    ...(unitRow ? [unitRow.join(delimiter)] : []),
    ...readings.map((reading) => columns.map((column) => text(column(reading))).join(delimiter)),
  ];
  return lines.join(lineEnd) + lineEnd;
}

const two = (value: number) => String(value).padStart(2, '0');

/** Wall clock of a reading when the log starts at `startHour` on 2 November 2026. */
export const stamps = {
  at: (timeS: number, startHour = 14) => new Date(Date.UTC(2026, 10, 2, startHour) + timeS * 1000),
  iso: (timeS: number, startHour?: number) => stamps.at(timeS, startHour).toISOString(),
  clock: (timeS: number, startHour?: number) => stamps.iso(timeS, startHour).slice(11, 19),
  clock12: (timeS: number, startHour?: number) => {
    const date = stamps.at(timeS, startHour);
    const hour = date.getUTCHours();
    const rest = `${two(date.getUTCMinutes())}:${two(date.getUTCSeconds())}`;
    return `${hour % 12 === 0 ? 12 : hour % 12}:${rest} ${hour < 12 ? 'AM' : 'PM'}`;
  },
  day: (timeS: number, order: 'dmy' | 'mdy', mark = '/', startHour?: number) => {
    const date = stamps.at(timeS, startHour);
    const [day, month] = [two(date.getUTCDate()), two(date.getUTCMonth() + 1)];
    return [...(order === 'dmy' ? [day, month] : [month, day]), date.getUTCFullYear()].join(mark);
  },
};

/** Recognises, reads and integrates a whole log, with corrections to the mapping as its owner would make them. */
export function integrateText(
  text: string,
  corrections: Partial<LogMapping> = {},
  options: IntegrateLogOptions & { pieceLength?: number; maxRows?: number } = {},
): LogResult | LogFailure {
  const recognised = recogniseColumns(text.slice(0, 64 * 1024));
  if (!recognised.ok) return recognised;
  const { pieceLength = 50_000, maxRows, ...integration } = options;
  const mapping = { ...recognised.mapping, ...corrections };
  const reader = createLogReader({ mapping, maxRows });
  for (let from = 0; from < text.length; from += pieceLength) {
    const failure = reader.push(text.slice(from, from + pieceLength));
    if (failure) return failure;
  }
  const samples = reader.finish();
  return samples.ok ? integrateLog(samples, { ...mapping, ...integration }) : samples;
}
