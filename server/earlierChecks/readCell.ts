import { type EarlierColumn, rangeText } from '@/lib/contract/earlierColumns';
import type { ColumnUnit } from '@/lib/contract/earlierUnits';
import { isCalendarDate, parseDuration, parseNumber } from '@/lib/units';

export interface Cell {
  header: string;
  unit: ColumnUnit | undefined;
  /** Trimmed. */
  text: string;
}

export type CellValue = string | number | null;
type ReadValue = { ok: true; value: CellValue } | { ok: false; message: string };

const value = (read: CellValue): ReadValue => ({ ok: true, value: read });
const refuse = (message: string): ReadValue => ({ ok: false, message });
const longest = 40;
const quoted = (text: string) => `"${text.length > longest ? `${text.slice(0, longest)}…` : text}"`;

/** Reads a filled cell into what is stored, or says what is wrong with it in the column's own unit. */
export function readCell(
  column: EarlierColumn,
  { text, unit }: Cell,
  ratedAh: number | undefined,
): ReadValue {
  if (/^[=@]/.test(text)) return refuse('This is a formula. Put its value into the cell.');
  switch (column.kind) {
    case 'text':
      return value(text);
    case 'date':
      return readDate(text);
    case 'choice':
      return readChoice(column, text);
    case 'duration':
      return readQuantity(unit, text, ratedAh, parseHours);
    case 'quantity':
      return readQuantity(unit, text, ratedAh, parseNumber);
  }
}

const parseHours = (text: string): number | undefined => {
  const seconds = parseDuration(text, { plainUnit: 'h' });
  return seconds === undefined ? undefined : seconds / 3600;
};

/** A unit repeated behind its number does no harm: "60 %" in a column of per cent. */
const withoutUnit = (text: string, unit = '') =>
  unit !== '' && text.toLowerCase().endsWith(unit.toLowerCase()) ? text.slice(0, -unit.length).trim() : text;

function readQuantity(
  unit: ColumnUnit | undefined,
  text: string,
  ratedAh: number | undefined,
  parse: (text: string) => number | undefined,
): ReadValue {
  const typed = parse(withoutUnit(text, unit?.unit));
  if (typed === undefined || !unit) return refuse(`${quoted(text)} is not a number.`);
  // Amperes of a bank that is not known are not held against anything.
  const stored = unit.toStored(typed, ratedAh ?? Number.NaN);
  const { min, max } = unit.limit;
  if (stored < min || stored > max) return refuse(`Enter a number from ${rangeText(unit, ratedAh)}.`);
  return value(stored);
}

const plainWord = (text: string) => text.toLowerCase().replace(/[^a-z]/g, '');

function readChoice({ choices }: EarlierColumn, text: string): ReadValue {
  const found = Object.entries(choices).find(
    ([word, stored]) => plainWord(word) === plainWord(text) || plainWord(stored) === plainWord(text),
  );
  if (found) return value(found[1]);
  return refuse(`${quoted(text)} is none of: ${Object.keys(choices).join(', ')}.`);
}

/** Year first, or with points as day, month, year; slashes mean one thing here and another there. */
function readDate(text: string): ReadValue {
  const yearFirst = /^(\d{4})[-/.](\d{1,2})[-/.](\d{1,2})$/.exec(text);
  const dayFirst = /^(\d{1,2})\.(\d{1,2})\.(\d{4})$/.exec(text);
  const [year, month, day] = yearFirst ? yearFirst.slice(1) : (dayFirst?.slice(1).reverse() ?? []);
  const date = `${year}-${month?.padStart(2, '0')}-${day?.padStart(2, '0')}`;
  if (year !== undefined && isCalendarDate(date)) return value(date);
  return refuse(`${quoted(text)} is not a day as year-month-day, such as 2025-10-04.`);
}
