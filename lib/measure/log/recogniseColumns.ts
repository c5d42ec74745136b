import { guessColumn, unitOfWord } from './columnWords';
import type { ColumnGuess } from './columnWords';
import { findTable } from './findTable';
import type { LogTable } from './findTable';
import { logFailure } from './logTypes';
import type { LogFailure, LogMapping, LogQuantity } from './logTypes';
import { parseLogNumber } from './parseLogNumber';
import { recogniseTime } from './recogniseTime';

/** A column of a log: its name and what it seems to hold. */
export interface RecognisedColumn extends ColumnGuess {
  index: number;
  name: string;
}

/**
 * Something that the log itself does not tell. `field` says where the answer goes in the mapping: "timeFormat",
 * "unit:3" (of column 3) or "column:current" (index of the column that holds it). The mapping holds the likeliest
 * choice until it is answered.
 */
export interface LogQuestion {
  field: string;
  text: string;
  choices: string[];
}

/** A log's columns as recognised, to be shown and corrected. */
export interface RecognisedColumns {
  ok: true;
  mapping: LogMapping;
  header: string[];
  columns: RecognisedColumn[];
  sampleRows: string[][];
  questions: LogQuestion[];
}

const single: LogQuantity[] = ['voltage', 'current', 'power', 'lowestCell', 'highestCell', 'counter'];
const defaultUnits: Partial<Record<LogQuantity, string>> = {
  voltage: 'V',
  current: 'A',
  power: 'W',
  temperature: '°C',
  lowestCell: 'V',
  highestCell: 'V',
  cell: 'V',
  counter: 'Ah',
};

/**
 * Recognises how a log is written from its first lines (64 kB or more are enough): delimiter, decimal mark, header,
 * what each column holds and in which unit, how stamps are written. What cannot be told becomes a question.
 */
export function recogniseColumns(sampleText: string): RecognisedColumns | LogFailure {
  const table = findTable(sampleText);
  if (!table.ok) return table;
  const width = table.rows[0]?.length ?? 0;
  const columns: RecognisedColumn[] = Array.from({ length: width }, (_, index) => {
    const name = table.header[index] ?? '';
    return { index, name: name || `Column ${index + 1}`, ...guessColumn(name, table.unitRow[index] ?? null) };
  });
  const questions: LogQuestion[] = [];
  keepOneOfEach(columns, questions);
  const timeFormat = settleTime(columns, table, questions);
  if (timeFormat === null) {
    return logFailure('noTimeColumn', 'No column of times was found. A log needs a time for each row.', {
      row: Math.max(0, table.headerLine) + 1,
    });
  }
  settleUnits(columns, table, questions);
  if (!columns.some(({ quantity }) => quantity === 'current' || quantity === 'power')) {
    const choices = columns.filter(({ quantity }) => quantity === null).map(({ index }) => String(index));
    if (choices.length === 0) return logFailure('noCurrentColumn', 'No column of currents was found.');
    questions.push({
      field: 'column:current',
      text: 'Which column holds the current of the whole bank?',
      choices,
    });
  }
  const used = columns.filter((column) => column.quantity !== null);
  const mapping: LogMapping = {
    delimiter: table.delimiter,
    decimal: table.decimal,
    headerLine: table.headerLine,
    columns: used.map(({ index, quantity, unit }) => ({
      index,
      quantity: quantity as LogQuantity,
      unit: unit ?? '',
    })),
    timeFormat,
  };
  return {
    ok: true,
    mapping,
    header: columns.map(({ name }) => name),
    columns,
    sampleRows: table.rows.slice(0, 6),
    questions,
  };
}

const fieldsOf = (table: LogTable, index: number) => table.rows.map((row) => row[index] ?? '');
const numbersOf = (table: LogTable, index: number) =>
  fieldsOf(table, index)
    .map((field) => parseLogNumber(field, table.decimal))
    .filter((value) => !Number.isNaN(value));

/** Where several columns could hold one quantity the surest stays; equals are asked about. */
const keepOneOfEach = (columns: RecognisedColumn[], questions: LogQuestion[]) => {
  for (const quantity of single) {
    const found = columns.filter((column) => column.quantity === quantity);
    if (found.length < 2) continue;
    const weight = (column: RecognisedColumn) =>
      column.confidence +
      (/dis|entlad|décharge|descarga|scarica/i.test(column.name) ? 0.3 : 0) +
      (/batt|pack|bank|total|akku/i.test(column.name) ? 0.3 : 0) -
      (/limit|max|min|avg|average|set|solar|pv|load|grid/i.test(column.name) ? 0.3 : 0);
    const ranked = [...found].sort((one, other) => weight(other) - weight(one));
    const [best, second] = ranked;
    if (best && second && weight(best) === weight(second)) {
      const equals = ranked.filter((column) => weight(column) === weight(best));
      questions.push({
        field: `column:${quantity}`,
        text: `Several columns could hold the ${quantityLabels[quantity]}. Which is the bank's?`,
        choices: equals.map(({ index }) => String(index)),
      });
    }
    ranked.slice(1).forEach((column) => (column.quantity = null));
  }
  // Several sensors at the cells are averaged; those of the air or the electronics are not among them.
  const temperatures = columns.filter((column) => column.quantity === 'temperature');
  const elsewhere = temperatures.filter(({ name }) =>
    /mos|fet|ambient|air|board|env|umgebung|inverter|sink/i.test(name),
  );
  if (elsewhere.length < temperatures.length) elsewhere.forEach((column) => (column.quantity = null));
};

/** A count that never falls may be a time under a name we do not know: worth a question. */
const askForTime = <Candidate extends { column: RecognisedColumn }>(
  counts: Candidate[],
  table: LogTable,
  questions: LogQuestion[],
): Candidate[] => {
  const rising = counts.filter(({ column }) => {
    const numbers = numbersOf(table, column.index);
    return numbers.length > 1 && numbers.every((value, row) => row === 0 || value > (numbers[row - 1] ?? 0));
  });
  if (rising.length > 0) {
    const choices = rising.map(({ column }) => String(column.index));
    questions.push({ field: 'column:time', text: 'Which column holds the time?', choices });
  }
  return rising.slice(0, 1);
};

/** Quantities of a log in words. */
export const quantityLabels: Record<LogQuantity, string> = {
  time: 'time',
  voltage: 'voltage',
  current: 'current',
  power: 'power',
  temperature: 'temperature',
  lowestCell: 'lowest cell voltage',
  highestCell: 'highest cell voltage',
  cell: 'voltage of one cell',
  counter: 'charge counter',
};

const settleTime = (
  columns: RecognisedColumn[],
  table: LogTable,
  questions: LogQuestion[],
): string | null => {
  const guess = (column: RecognisedColumn) =>
    recogniseTime(fieldsOf(table, column.index), column.unit, table.decimal);
  const isCount = (format: string) => /^(elapsed(S|Ms|Min|H)|epoch)/.test(format);
  const named = columns.filter((column) => column.quantity === 'time');
  const unnamed = columns.filter(({ quantity }) => quantity === null);
  const readable = (candidates: RecognisedColumn[], allowCounts: boolean) =>
    candidates.flatMap((column) => {
      const found = guess(column);
      return found && (allowCounts || !isCount(found.format)) ? [{ column, found }] : [];
    });
  let candidates = readable(named, true);
  if (candidates.length === 0) candidates = readable(unnamed, false);
  // Without any header the first column is the likeliest, if it never falls.
  if (candidates.length === 0 && table.headerLine < 0) candidates = readable(columns.slice(0, 1), true);
  if (candidates.length === 0) candidates = askForTime(readable(unnamed, true), table, questions);
  columns.forEach((column) => column.quantity === 'time' && (column.quantity = null));
  const isDay = ({ column }: { column: RecognisedColumn }) =>
    fieldsOf(table, column.index).every((field) => !field.includes(':'));
  const dated = candidates.filter(({ found }) => ['ymd', 'dmy', 'mdy'].includes(found.format));
  const clock = candidates.find(({ found }) => found.format === 'clock' || found.format === 'elapsedClock');
  const whole = dated.find((candidate) => !isDay(candidate));
  const day = dated.find(isDay);
  const first =
    whole ?? (day && clock ? day : undefined) ?? candidates.find((candidate) => candidate !== day);
  if (!first) return null;
  first.column.quantity = 'time';
  if (first === day && clock) clock.column.quantity = 'time';
  if (first.found.choices.length > 0) {
    questions.push({
      field: 'timeFormat',
      text:
        first.found.format === 'dmy' || first.found.format === 'mdy'
          ? `Is the day or the month first in "${table.rows[0]?.[first.column.index]?.trim().slice(0, 40) ?? ''}"?`
          : `In which unit does the column "${first.column.name}" count time?`,
      choices: first.found.choices,
    });
  }
  return first.found.format;
};

const median = (values: number[]) =>
  [...values].sort((one, other) => one - other)[Math.floor(values.length / 2)] ?? 0;

/** Above these a value without a unit is not likely to be in the plain unit; the choices are then asked. */
const unitDoubts: Partial<Record<LogQuantity, { above: number; choices: string[] }>> = {
  current: { above: 1000, choices: ['mA', 'A'] },
  voltage: { above: 1000, choices: ['mV', 'V'] },
  lowestCell: { above: 10, choices: ['mV', 'V'] },
  highestCell: { above: 10, choices: ['mV', 'V'] },
  cell: { above: 10, choices: ['mV', 'V'] },
  power: { above: 100_000, choices: ['W', 'kW'] },
  temperature: { above: 45, choices: ['°F', '°C'] },
  counter: { above: 10_000, choices: ['mAh', 'Ah'] },
};

const settleUnits = (columns: RecognisedColumn[], table: LogTable, questions: LogQuestion[]) => {
  for (const column of columns) {
    const { quantity } = column;
    if (quantity === null || quantity === 'time' || column.unit !== null) continue;
    const fromCells = unitBehindNumbers(fieldsOf(table, column.index));
    if (fromCells) {
      column.unit = fromCells;
      continue;
    }
    const doubt = unitDoubts[quantity];
    const isDoubtful = doubt && median(numbersOf(table, column.index).map(Math.abs)) > doubt.above;
    column.unit = (isDoubtful ? doubt.choices[0] : defaultUnits[quantity]) ?? null;
    if (isDoubtful) {
      questions.push({
        field: `unit:${column.index}`,
        text: `In which unit is the ${quantityLabels[quantity]} in "${column.name}"?`,
        choices: doubt.choices,
      });
    }
  }
};

const unitBehindNumbers = (fields: string[]): string | null => {
  const words = fields.map((field) => /\d\s*([°µa-zA-Z]{1,4})\s*$/.exec(field)?.[1]).filter(Boolean);
  return words.length >= fields.length * 0.5 && words[0] ? unitOfWord(words[0]) : null;
};
