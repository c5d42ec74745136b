import { convert, isConvertible, isUnit } from '@/lib/units';
import type { Unit } from '@/lib/units';

import { logFailure, logQuantities, timeFormatLabels } from './logTypes';
import type { LogFailure, LogMapping, LogQuantity, TimeFormat } from './logTypes';
import { parseLogNumber } from './parseLogNumber';
import { createStampParser } from './timeStamp';

/** Where a number stands in a row, and the straight line that turns it into our unit. */
interface Source {
  index: number;
  factor: number;
  offset: number;
}

/** What each row needs, settled once: which fields, which conversions, how stamps are read. */
export interface MappingPlan {
  ok: true;
  timeFormat: TimeFormat;
  columnsOf: Record<LogQuantity, Source[]>;
  lastIndex: number;
  stampOf(fields: string[]): string;
  parseStamp(text: string): number;
  number(fields: string[], source: Source): number;
}

const baseUnits: Partial<Record<LogQuantity, Unit>> = {
  voltage: 'V',
  current: 'A',
  power: 'W',
  temperature: '°C',
  lowestCell: 'V',
  highestCell: 'V',
  cell: 'V',
  counter: 'Ah',
};

/** Settles how a mapping is followed, or says what is wrong with it. */
export function planMapping(mapping: LogMapping): MappingPlan | LogFailure {
  const columnsOf: Record<LogQuantity, Source[]> = {
    time: [],
    voltage: [],
    current: [],
    power: [],
    temperature: [],
    lowestCell: [],
    highestCell: [],
    cell: [],
    counter: [],
  };
  for (const { index, quantity, unit } of mapping.columns) {
    const column = index + 1;
    if (!Number.isInteger(index) || index < 0 || !logQuantities.includes(quantity)) {
      return logFailure('badMapping', 'A chosen column does not exist.', { column });
    }
    const line = lineOf(quantity, unit);
    if (!line) return logFailure('badMapping', `"${unit}" is no unit for column ${column}.`, { column });
    columnsOf[quantity].push({ index, ...line });
  }
  if (!Object.hasOwn(timeFormatLabels, mapping.timeFormat)) {
    return logFailure('badMapping', 'Choose how the times are written.');
  }
  if (columnsOf.time.length === 0)
    return logFailure('noTimeColumn', 'Choose the column that holds the time.');
  const derivesCurrent = columnsOf.power.length > 0 && columnsOf.voltage.length > 0;
  if (columnsOf.current.length === 0 && !derivesCurrent) {
    return logFailure(
      'noCurrentColumn',
      'Choose the column that holds the current, or those of power and voltage.',
    );
  }
  const timeFormat = mapping.timeFormat as TimeFormat;
  const [firstTime = 0, secondTime] = columnsOf.time.map(({ index }) => index);
  return {
    ok: true,
    timeFormat,
    columnsOf,
    lastIndex: Math.max(...mapping.columns.map(({ index }) => index)),
    stampOf(fields) {
      const first = fields[firstTime] ?? '';
      if (secondTime === undefined) return first;
      const second = fields[secondTime] ?? '';
      return first.includes(':') ? `${second} ${first}` : `${first} ${second}`;
    },
    parseStamp: createStampParser(timeFormat, mapping.decimal),
    number: (fields, { index, factor, offset }) =>
      parseLogNumber(fields[index] ?? '', mapping.decimal) * factor + offset,
  };
}

const lineOf = (quantity: LogQuantity, unit: string): { factor: number; offset: number } | undefined => {
  const base = baseUnits[quantity];
  if (!base || unit === '' || unit === base) return { factor: 1, offset: 0 };
  if (!isUnit(unit) || !isConvertible(unit, base)) return undefined;
  const offset = convert(0, unit, base);
  return { factor: convert(1, unit, base) - offset, offset };
};
