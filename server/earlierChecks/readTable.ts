import { createHash } from 'node:crypto';

import Papa from 'papaparse';

import {
  type EarlierColumn,
  earlierColumns,
  headerOf,
  headersOf,
  problemColumn,
  sourceColumns,
} from '@/lib/contract/earlierColumns';
import type { ColumnUnit } from '@/lib/contract/earlierUnits';
import { limits } from '@/lib/contract/limits';
import { decodeSniff } from '@/lib/measure';

import { AppError } from '../errors';

/** A column of the file that is read: what it holds and in which unit. */
export interface PlacedColumn {
  index: number;
  /** As the file names it. */
  header: string;
  column: EarlierColumn;
  unit: ColumnUnit | undefined;
}

export interface TableRow {
  /** As a spreadsheet counts. */
  row: number;
  cells: string[];
}

export interface Table {
  digest: string;
  delimiter: string;
  header: string[];
  columns: PlacedColumn[];
  /** Places of the columns that say how others are known, by their name. */
  sourceColumns: Map<string, number>;
  rows: TableRow[];
  /** How it was read, where that may surprise. */
  notes: string[];
}

const startAgain = 'Save the sheet as CSV, with the names of its columns in row 1, and send that.';
const refuse = (message: string) => new AppError('invalid', message, { file: message });

/**
 * Reads a file of earlier checks into rows of text, its columns told apart by the names in row 1.
 * @throws AppError invalid, naming row and column, where the file as a whole can't be read
 */
export function readTable(bytes: Buffer): Table {
  const { text, notes } = decode(bytes);
  const delimiter = delimiterOf(text);
  const { data, errors } = Papa.parse<string[]>(text, { delimiter });
  const quote = errors.find(({ type }) => type === 'Quotes');
  if (quote) throw refuse(`Row ${(quote.row ?? 0) + 1} has a quotation mark that is not closed.`);
  const header = (data[0] ?? []).map((name) => name.trim());
  const columns = placeColumns(header);
  const isRead = ({ cells }: TableRow) =>
    cells.some((cell) => cell.trim() !== '') && !cells[0]?.trim().startsWith('#');
  const rows = data
    .map((cells, index) => ({ row: index + 1, cells }))
    .slice(1)
    .filter(isRead);
  if (rows.length === 0)
    throw refuse('There is no check in this file: below row 1 all rows are empty or begin with #.');
  if (rows.length > limits.tableRows.max)
    throw refuse(
      `The file has ${rows.length} checks; ${limits.tableRows.max} fit at once. Send the rows from ${rows[limits.tableRows.max]!.row} on in a second file.`,
    );
  return {
    ...{ delimiter, header, columns, rows },
    digest: createHash('sha256').update(bytes).digest('hex'),
    sourceColumns: new Map(
      sourceColumns.flatMap(({ name }) => {
        const index = header.findIndex((one) => plainName(one) === name);
        return index < 0 ? [] : [[name, index] as const];
      }),
    ),
    notes: [...notes, ...unreadColumns(header, columns)],
  };
}

function decode(bytes: Buffer): { text: string; notes: string[] } {
  const sniffed = decodeSniff(bytes);
  if (!sniffed.ok)
    throw refuse(
      sniffed.reason === 'empty' ? 'The file is empty.' : `This file is not a text file. ${startAgain}`,
    );
  const text = new TextDecoder(sniffed.encoding).decode(bytes.subarray(sniffed.bomBytes));
  const notes =
    sniffed.encoding === 'windows-1252'
      ? ['The file is not in UTF-8; it was read as Windows-1252. Look at letters with accents.']
      : [];
  return { text, notes };
}

const plainName = (name: string) =>
  name
    .trim()
    .toLowerCase()
    .replace(/[\s-]+/g, '_');

interface Named {
  column: EarlierColumn;
  unit: ColumnUnit | undefined;
}

const namesOf = (column: EarlierColumn): [string, Named][] =>
  column.units.length === 0
    ? [[column.name, { column, unit: undefined }]]
    : column.units.map((unit) => [headerOf(column, unit), { column, unit }]);
const named = new Map(earlierColumns.flatMap(namesOf));
const spareNames = new Set<string>([...sourceColumns.map(({ name }) => name), problemColumn]);
const isKnown = (name: string) => named.has(plainName(name)) || spareNames.has(plainName(name));

/** The one of the usual marks that makes most of row 1 into names we know. */
function delimiterOf(text: string): string {
  const knownWith = (delimiter: string) =>
    (Papa.parse<string[]>(text, { delimiter, preview: 1 }).data[0] ?? []).filter(isKnown).length;
  const counted = [',', ';', '\t'].map((delimiter) => ({ delimiter, known: knownWith(delimiter) }));
  return counted.reduce((best, one) => (one.known > best.known ? one : best)).delimiter;
}

function placeColumns(header: string[]): PlacedColumn[] {
  const known = header.flatMap((name, index) => {
    const found = named.get(plainName(name));
    return found ? [{ ...found, index, header: name }] : [];
  });
  if (known.length === 0) throw refuse(`Row 1 has none of the template's columns. ${startAgain}`);
  for (const [index, name] of header.entries()) {
    const first = header.findIndex((other) => plainName(other) === plainName(name));
    if (first < index && isKnown(name))
      throw refuse(`Row 1 names the column ${name} twice, in places ${first + 1} and ${index + 1}.`);
  }
  const missing = earlierColumns.filter(
    (column) => !column.isOptional && !known.some((one) => one.column === column),
  );
  if (missing.length > 0)
    throw refuse(`Row 1 lacks: ${missing.map((column) => headersOf(column).join(' or ')).join(', ')}.`);
  return known;
}

function unreadColumns(header: string[], columns: PlacedColumn[]): string[] {
  const read = new Set(columns.map(({ index }) => index));
  const unread = header.filter((name, index) => !read.has(index) && name !== '' && !isKnown(name));
  return unread.length === 0
    ? []
    : [`Not read, because the template has no such column: ${unread.join(', ')}.`];
}
