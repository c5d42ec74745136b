import { logFailure } from './logTypes';
import type { LogFailure, LogMapping } from './logTypes';
import { splitFields } from './splitFields';
import { unitOfWord } from './columnWords';

/** Where the table of a log stands and how it is written; lines count from 0. */
export interface LogTable {
  ok: true;
  delimiter: LogMapping['delimiter'];
  decimal: LogMapping['decimal'];
  /** Last line above the rows, names or units; -1 where the rows have no header. */
  headerLine: number;
  header: string[];
  /** Units from a row of their own below the header. */
  unitRow: (string | null)[];
  rows: string[][];
}

const maxLines = 400;
const delimiters: LogMapping['delimiter'][] = ['\t', ';', ','];
const numberLike = /^[\s+\-\u2212]*\d[\d\s.,'’]*(?:[eE][+-]?\d+)?\s*[°µa-zA-Z%]{0,3}$/;
const stampLike = /^\d{1,4}([-/.])(\d{1,2}|[a-zA-Z]{3,9})\1\d{1,4}|^\d{1,4}:\d\d|^\d{1,3}\s?d\w*\s/;

// No number, time or name is longer; patterns are kept from running over a hostile field.
const short = (field: string) => field.slice(0, 80);

const isData = (field: string) => numberLike.test(field.trim()) || stampLike.test(field.trim());
const isDataRow = (fields: string[]) => {
  const filled = fields.filter((field) => field.trim() !== '');
  return filled.length >= 2 && filled.filter(isData).length >= Math.max(2, filled.length * 0.5);
};

/** Finds the table in the first lines of a log: a delimiter, the rows of data, the header above them. */
export function findTable(sampleText: string): LogTable | LogFailure {
  const text = sampleText.replace(/^\ufeff/, '');
  if (text.trim() === '') return logFailure('empty', 'The file is empty.');
  if (text.includes('\u0000')) return logFailure('binary', 'This file is not text. Send the log as CSV.');
  const unreadable = text.split('\ufffd').length - 1;
  if (unreadable > text.length * 0.01) {
    return logFailure(
      'wrongEncoding',
      'The text cannot be read in any encoding we know. Save the log as UTF-8.',
    );
  }
  const lines = text.split(/\r\n|\n|\r/).slice(0, maxLines);
  const delimiter = sepLine(lines[0] ?? '') ?? delimiters.find((candidate) => hasTable(lines, candidate));
  const none = logFailure(
    'noTable',
    'No table of numbers was found. The log should be CSV: a header, then rows.',
  );
  if (!delimiter) return none;
  const split = lines.map((line) => (line.trim() === '' ? [] : splitFields(line, delimiter).map(short)));
  const width = modalWidth(split.filter(isDataRow));
  const firstData = split.findIndex((fields) => fields.length === width && isDataRow(fields));
  if (firstData < 0) return none;
  const rows = split.slice(firstData).filter((fields) => fields.length === width && isDataRow(fields));
  const above = headerAbove(split, firstData, width);
  const headerWidth = above.header.length;
  if (delimiter === ',' && headerWidth > 0 && width >= 2 * headerWidth - 2 && width > headerWidth + 1) {
    return logFailure(
      'delimiterUnclear',
      'The rows have about twice as many fields as the header: commas seem to be both the decimal mark and the ' +
        'separator. Export the log again with semicolons or tabs between the columns.',
      { row: firstData + 1 },
    );
  }
  return { ok: true, delimiter, decimal: decimalOf(rows), ...above, rows };
}

const sepLine = (line: string): LogMapping['delimiter'] | undefined => {
  const mark = /^"?sep=(.)/i.exec(line)?.[1];
  return delimiters.find((delimiter) => delimiter === mark);
};

/** A delimiter makes a table when most of the later lines have one width of two or more under it. */
const hasTable = (lines: string[], delimiter: string): boolean => {
  const filled = lines.filter((line) => line.trim() !== '');
  const later = filled
    .slice(Math.floor(filled.length / 2))
    .map((line) => splitFields(line, delimiter).map(short));
  const rows = later.filter(isDataRow);
  return rows.length > 0 && rows.length >= later.length * 0.5 && modalWidth(rows) >= 2;
};

const modalWidth = (rows: string[][]): number => {
  const counts = new Map<number, number>();
  for (const row of rows) counts.set(row.length, (counts.get(row.length) ?? 0) + 1);
  return [...counts].sort((one, other) => other[1] - one[1] || other[0] - one[0])[0]?.[0] ?? 0;
};

const headerAbove = (split: string[][], firstData: number, width: number) => {
  const headless = { headerLine: -1, header: [] as string[], unitRow: [] as (string | null)[] };
  const clean = (fields: string[]) => fields.map(cleanName);
  const isHeader = (fields: string[] | undefined): fields is string[] =>
    fields !== undefined &&
    fields.length >= 2 &&
    fields.length >= Math.min(width, 3) - 1 &&
    fields.filter((field) => /[a-zA-Zà-ÿ°]/.test(field) && !isData(field)).length >= fields.length * 0.5;
  let line = firstData - 1;
  while (line >= 0 && split[line]?.length === 0) line -= 1;
  const nearest = split[line];
  if (!isHeader(nearest)) return headless;
  const units = nearest.map((field) => unitOfWord(field.replace(/[()[\]{}]/g, '')));
  const named = nearest.filter((field) => field.trim() !== '').length;
  const isUnitRow = units.filter(Boolean).length >= Math.max(2, named * 0.6);
  const higher = split[line - 1];
  if (isUnitRow && isHeader(higher) && higher.length === nearest.length) {
    return { headerLine: line, header: clean(higher), unitRow: units };
  }
  return { headerLine: line, header: clean(nearest), unitRow: [] };
};

/** A column's name as it may be shown: one line, no control characters, at most 80 characters. */
const cleanName = (field: string) =>
  field
    .replace(/[\u0000-\u001f\u007f\u200e\u200f\u202a-\u202e\ufeff]/g, ' ')
    .trim()
    .slice(0, 80);

const decimalOf = (rows: string[][]): '.' | ',' => {
  let commas = 0;
  let points = 0;
  for (const field of rows.flat()) {
    const text = field.trim();
    if (!numberLike.test(text)) continue;
    const last = Math.max(text.lastIndexOf(','), text.lastIndexOf('.'));
    if (last < 0) continue;
    if (text[last] === ',') commas += 1;
    else points += 1;
  }
  return commas > points ? ',' : '.';
};
