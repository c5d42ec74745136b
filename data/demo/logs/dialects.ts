import { createDraws, type Draws, toStep } from '../random';
import type { Moment } from './simulateDischarge';

/** How a logger writes its rows. */
export interface Dialect {
  stepS: number;
  head: string[];
  row: (moment: Moment, at: Date) => string[];
  delimiter: string;
  /** Seconds since the start between which nothing was written. */
  gap?: { fromS: number; toS: number };
}

const pad = (value: number) => String(value).padStart(2, '0');
const fixed = (value: number, decimals: number) => value.toFixed(decimals).replace(/^-(0(?:\.0+)?)$/, '$1');
const comma = (value: number, decimals: number) => fixed(value, decimals).replace('.', ',');
const clock = (at: Date) => `${pad(at.getUTCHours())}:${pad(at.getUTCMinutes())}:${pad(at.getUTCSeconds())}`;

/** Comma, ISO stamps in UTC, volts and amperes, discharge positive, every 30 s. */
export const isoDialect: Dialect = {
  stepS: 30,
  delimiter: ',',
  head: ['timestamp,pack_voltage_V,pack_current_A,cell_temp_C,cell_min_V,cell_max_V'],
  row: (moment, at) => [
    at.toISOString().replace('.000', ''),
    fixed(moment.voltageV, 2),
    fixed(moment.currentA, 2),
    fixed(moment.temperatureC, 1),
    fixed(moment.lowestCellV, 3),
    fixed(moment.highestCellV, 3),
  ],
};

/** Semicolon, decimal comma, day first, a preamble, day and clock apart, power beside current, every 60 s. */
export const preambleDialect: Dialect = {
  stepS: 60,
  delimiter: ';',
  head: [
    'Messprotokoll;;;;;;;',
    'Anlage;Werkstatt, 8 in Reihe, 3 parallel;;;;;;',
    'Fühler;zwischen Zelle 4 und 5;;;;;;',
    'Intervall;60 s;;;;;;',
    '',
    'Datum;Uhrzeit;Spannung (V);Strom (A);Leistung (W);Temperatur (°C);Zelle min (V);Zelle max (V)',
  ],
  row: (moment, at) => [
    `${pad(at.getUTCDate())}.${pad(at.getUTCMonth() + 1)}.${at.getUTCFullYear()}`,
    clock(at),
    comma(moment.voltageV, 2),
    comma(-moment.currentA, 2),
    comma(-moment.currentA * moment.voltageV, 0),
    comma(moment.temperatureC, 1),
    comma(moment.lowestCellV, 3),
    comma(moment.highestCellV, 3),
  ],
};

const twelveHours = (at: Date) => {
  const hours = at.getUTCHours();
  const rest = `${pad(at.getUTCMinutes())}:${pad(at.getUTCSeconds())}`;
  return `${hours % 12 || 12}:${rest} ${hours < 12 ? 'AM' : 'PM'}`;
};

/** Tab, month first with a 12-hour clock, millivolts and milliamperes, °F, discharge negative, four minutes missing. */
export const milliDialect: Dialect = {
  stepS: 30,
  delimiter: '\t',
  head: ['Date/Time\tPack voltage (mV)\tPack current (mA)\tCell temp (°F)\tLowest cell (mV)\tHighest cell (mV)'],
  gap: { fromS: 10_920, toS: 11_160 },
  row: (moment, at) => [
    `${at.getUTCMonth() + 1}/${at.getUTCDate()}/${at.getUTCFullYear()} ${twelveHours(at)}`,
    fixed(moment.voltageV * 1000, 0),
    fixed(-moment.currentA * 1000, 0),
    fixed(32 + moment.temperatureC * 1.8, 1),
    fixed(moment.lowestCellV * 1000, 0),
    fixed(moment.highestCellV * 1000, 0),
  ],
};

/** Writes the moments a logger caught, with its noise, as the text of its file. */
export function writeLog(dialect: Dialect, moments: readonly Moment[], startsAt: string, seed: number): string {
  const draws = createDraws(seed, 10);
  const start = Date.parse(startsAt);
  const { gap, stepS } = dialect;
  const rows = moments
    .filter(({ timeS }) => timeS % stepS === 0 && !(gap && timeS > gap.fromS && timeS < gap.toS))
    .map((moment) => dialect.row(caught(draws, moment), new Date(start + moment.timeS * 1000)));
  return [...dialect.head, ...rows.map((row) => row.join(dialect.delimiter)), ''].join('\r\n');
}

function caught(draws: Draws, moment: Moment): Moment {
  return {
    ...moment,
    currentA: moment.currentA === 0 ? 0 : moment.currentA * (1 + draws.normal(0, 0.001)),
    voltageV: moment.voltageV + draws.normal(0, 0.004),
    temperatureC: toStep(moment.temperatureC + draws.normal(0, 0.05), 0.1),
    lowestCellV: moment.lowestCellV + draws.normal(0, 0.0008),
    highestCellV: moment.highestCellV + draws.normal(0, 0.0008),
  };
}
