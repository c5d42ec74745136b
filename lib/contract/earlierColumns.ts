import { formatNumber } from '@/lib/units';

import type { conditionsSchema, readingSchema } from './checks';
import {
  ampereHours,
  amperes,
  type ColumnUnit,
  counterUnits,
  degrees,
  energy,
  hours,
  minutes,
  percent,
  plain,
  rates,
  volts,
} from './earlierUnits';
import { limits } from './limits';

/** Where a column's value goes; `counter` fills the counter and its kind, `bank` says whose check it is. */
export type EarlierField =
  keyof typeof readingSchema.shape | keyof typeof conditionsSchema.shape | 'counter' | 'bank' | 'note';

export interface EarlierColumn {
  field: EarlierField;
  /** The column's name; for a quantity without the unit that follows it. */
  name: string;
  isOptional: boolean;
  kind: 'date' | 'text' | 'choice' | 'duration' | 'quantity';
  units: readonly ColumnUnit[];
  /** What may stand in the column, and what is stored for it. */
  choices: Readonly<Record<string, string>>;
  meaning: string;
  /** In the column's first unit; empty where the example leaves it out. */
  example: string;
}

type Words = [meaning: string, example: string];

const base = (field: EarlierField, name: string, [meaning, example]: Words) => ({
  ...{ field, name, meaning, example, isOptional: false, units: [], choices: {} },
});
const text = (field: EarlierField, name: string, ...words: Words): EarlierColumn => ({
  ...base(field, name, words),
  kind: 'text',
});
const quantity = (field: EarlierField, name: string, units: ColumnUnit[], words: Words): EarlierColumn => ({
  ...base(field, name, words),
  kind: 'quantity',
  units,
});
const choice = (
  field: EarlierField,
  name: string,
  choices: EarlierColumn['choices'],
  words: Words,
): EarlierColumn => ({ ...base(field, name, words), kind: 'choice', choices });
const optional = (column: EarlierColumn): EarlierColumn => ({ ...column, isOptional: true });

const methods = { discharge: 'countedDischarge', charge: 'countedCharge' };
const fullChargeEnds = { voltage_and_tail: 'voltageAndTail', bms: 'bms', time: 'time' };
const dischargeEnds = {
  lowest_cell: 'lowestCell',
  bank_voltage: 'bankVoltage',
  bms_trip: 'bmsTrip',
  load: 'load',
};
const places = { cells: 'cells', air: 'air' };

const error = percent(limits.gainErrorFraction);
const noise = percent(limits.readingNoiseFraction);
const celsius = degrees(limits.temperatureC);
const cellVolts = volts(limits.cellV);
const share = percent(limits.socFraction);
const rate = rates(limits.rateIt);

/** The day stands first, so that a line that begins with # is never a check. */
const readingColumns: EarlierColumn[] = [
  {
    ...base('testedOn', 'tested_on', ['Day of the test, year-month-day', '2025-10-04']),
    kind: 'date',
  },
  optional(text('bank', 'bank', 'Name of the bank, as it stands in your list', 'Shed bank')),
  choice('method', 'method', methods, ['Whether what came out was counted, or what went in', 'discharge']),
  text('instrument', 'instrument', 'The meter, such as a shunt with a display', 'Shunt 300 A'),
  quantity('gainErrorFraction', 'gain_error', error, ["The meter's own error, as its maker says", '0.5']),
  quantity('readingNoiseFraction', 'reading_noise', noise, [
    "Scatter of its readings; 0.2 if you don't know (common practice, no source)",
    '0.2',
  ]),
  quantity('capacityAh', 'capacity', ampereHours(limits.capacityAh), ['Charge, of the whole bank', '226.4']),
  quantity('energyWh', 'energy', energy(limits.energyWh), ['Energy, of the whole bank', '11.57']),
  quantity('meanCurrentA', 'mean_current', amperes(limits.meanCurrentA), [
    'Mean current of the test, pauses left out',
    '48',
  ]),
  {
    ...quantity('durationS', 'duration', hours(limits.durationS), [
      'How long the test took: 4:43, or 4.72',
      '4:43',
    ]),
    kind: 'duration',
  },
  quantity('temperatureStartC', 'temperature_start', celsius, ['Cells at the start', '21']),
  quantity('temperatureEndC', 'temperature_end', celsius, ['Cells at the end', '23']),
  choice('fullChargeEndedBy', 'full_charge_ended_by', fullChargeEnds, [
    'What ended the full charge',
    'voltage_and_tail',
  ]),
  optional(quantity('restMinutes', 'rest', minutes(limits.restMinutes), ['Rest after the charge', '60'])),
  choice('dischargeEndedBy', 'discharge_ended_by', dischargeEnds, [
    'What ended the discharge',
    'lowest_cell',
  ]),
  optional(text('endedByCell', 'ended_by_cell', 'Which cell was lowest: its number or name', '7')),
  optional(quantity('lowestCellAtFullV', 'lowest_cell_at_full', cellVolts, ['Lowest cell at full', '3.45'])),
  quantity('highestCellAtFullV', 'highest_cell_at_full', cellVolts, ['Highest cell at full', '3.47']),
  quantity('lowestCellAtEndV', 'lowest_cell_at_end', cellVolts, [
    'Lowest cell at the end, the load still on',
    '2.80',
  ]),
  optional(
    quantity('highestCellAtEndV', 'highest_cell_at_end', cellVolts, [
      'Highest cell at the same moment',
      '2.95',
    ]),
  ),
];

/** How the bank lived since the check before it. */
const conditionColumns: EarlierColumn[] = [
  quantity('depthFraction', 'depth', percent(limits.depthFraction), [
    'Charge taken out on a typical day, of the rated capacity',
    '60',
  ]),
  quantity('dischargeIt', 'use_mean', rate, ['Mean current in use, while discharging', '0.1']),
  optional(quantity('chargeIt', 'use_charge', rate, ['Mean current in use, while charging', '0.2'])),
  optional(quantity('peakIt', 'use_peak', rates(limits.peakIt), ['Peak current in use', '0.5'])),
  quantity('temperatureMeanC', 'temperature_mean', celsius, ['Mean over the year', '19']),
  optional(quantity('temperatureHottestC', 'temperature_hottest', celsius, ['Hottest month', '28'])),
  optional(quantity('temperatureColdestC', 'temperature_coldest', celsius, ['Coldest month', '9'])),
  optional(
    choice('temperatureOf', 'temperature_of', places, ['Of the cells, or the air around them', 'cells']),
  ),
  optional(quantity('coldestChargingC', 'coldest_charging', celsius, ['Coldest while charging', '6'])),
  optional(
    quantity('socMeanFraction', 'soc_mean', share, [
      'Mean state of charge; it or the daily window is needed',
      '55',
    ]),
  ),
  optional(quantity('socLowFraction', 'soc_low', share, ['Low end of the daily window', ''])),
  optional(quantity('socHighFraction', 'soc_high', share, ['High end of the daily window', ''])),
  optional(
    quantity('counter', 'counter', counterUnits(limits), [
      'What was taken out since new, in one of three units; it or the cycles a day are needed',
      '610',
    ]),
  ),
  optional(
    quantity('cyclesPerDay', 'cycles_per_day', plain(limits.cyclesPerDay), [
      'Cycles of the typical depth a day',
      '0.9',
    ]),
  ),
  optional(quantity('idleDays', 'idle_days', plain(limits.idleDays), ['Days it stood idle', '14'])),
  optional(quantity('idleSocFraction', 'idle_soc', share, ['State of charge on those days', '50'])),
];

/** Every column that says something of a check, in the template's order. */
export const earlierColumns: readonly EarlierColumn[] = [
  ...readingColumns,
  ...conditionColumns,
  optional(text('note', 'note', 'Anything odd, for the moderator; no names or places', 'From my notebook')),
];

/** Columns that name others, set off by spaces: how their values came to be known. */
export const sourceColumns = [
  { name: 'metered', source: 'metered', meaning: 'Columns whose values were metered' },
  { name: 'read_off', source: 'readOff', meaning: 'Columns whose values were read off the BMS' },
  { name: 'estimated', source: 'estimated', meaning: 'Columns whose values were estimated' },
] as const;

/** Added to rows that are handed back to be corrected; not read when they come again. */
export const problemColumn = 'problem';

/** The name of a column in one of its units, as it stands in the first row of a file. */
export const headerOf = ({ name }: EarlierColumn, unit?: ColumnUnit): string =>
  unit && unit.suffix !== '' ? `${name}_${unit.suffix}` : name;

/** Every name under which a column may stand. */
export const headersOf = (column: EarlierColumn): string[] =>
  column.units.length === 0 ? [column.name] : column.units.map((unit) => headerOf(column, unit));

/** What may stand in a quantity's column: a range with its unit. `ratedAh` turns It into the bank's amperes. */
export function rangeText({ limit, unit, toTyped }: ColumnUnit, ratedAh = 1): string {
  const shown = (stored: number) => {
    const typed = toTyped(stored, ratedAh);
    return typed !== 0 && Math.abs(typed) < 1
      ? formatNumber(typed, { significant: 1 })
      : formatNumber(typed, { decimals: Number.isInteger(typed) ? 0 : 1 });
  };
  return `${shown(limit.min)} to ${shown(limit.max)}${unit === '' ? '' : ` ${unit}`}`;
}

/** What may stand in a column, in words. */
export function allowedWords({ kind, choices, units }: EarlierColumn): string {
  if (kind === 'choice') return Object.keys(choices).join(', ');
  if (kind === 'date') return 'year-month-day';
  const [first] = units;
  return first ? rangeText(first) : 'words';
}
