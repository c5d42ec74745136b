import { type CheckFields, checkSourcedFieldsSchema, enteredFieldsSchema } from '@/lib/contract/checks';
import type { RowProblem } from '@/lib/contract/earlierChecks';
import {
  type EarlierColumn,
  earlierColumns,
  type EarlierField,
  headersOf,
  sourceColumns,
} from '@/lib/contract/earlierColumns';
import type { FieldSource } from '@/lib/contract/fields';

import { type Cell, type CellValue, readCell } from './readCell';
import type { PlacedColumn, Table, TableRow } from './readTable';

export type ReadRow = { ok: true; fields: CheckFields; problems: [] } | { ok: false; problems: RowProblem[] };

/** What the form takes for granted of a meter's figures until it is told otherwise. */
const metered: CheckFields['sources'] = {
  capacityAh: 'metered',
  energyWh: 'metered',
  meanCurrentA: 'metered',
  durationS: 'metered',
};

/**
 * Reads a row's cells into what the form of a check sends, by the same contract.
 * @param ratedAh of the bank; undefined where it is not known, and the cells are only read one by one
 */
export function readRow(table: Table, { cells }: TableRow, ratedAh: number | undefined): ReadRow {
  const problems: RowProblem[] = [];
  if (cells.slice(table.header.length).some((cell) => cell.trim() !== ''))
    problems.push({
      column: null,
      message: `This row has ${cells.length} values, row 1 names ${table.header.length} columns. A value with a comma in it needs quotation marks, or ; between the values.`,
    });
  const values = new Map<EarlierField, CellValue>();
  let counterKind: string | null = null;
  for (const column of earlierColumns.filter(({ field }) => field !== 'bank')) {
    const found = readColumn(column, filledCells(table, column, cells), ratedAh);
    if ('message' in found) problems.push({ column: found.header, message: found.message });
    else values.set(column.field, found.value);
    if (column.field === 'counter' && 'value' in found) counterKind = found.unit ?? null;
  }
  const sources = readSources(table, cells, values, problems);
  if (problems.length > 0 || ratedAh === undefined) return { ok: false, problems };
  const read = enteredFieldsSchema.safeParse(assemble(values, counterKind, sources));
  if (read.success) return { ok: true, fields: read.data, problems: [] };
  return {
    ok: false,
    problems: read.error.issues.map(({ path, message }) => ({
      column: headerFor(table, String(path.at(-1))),
      message,
    })),
  };
}

/** The column of the file that a field of the contract is read from. */
export function headerFor({ columns }: Table, field: string): string | null {
  const meant = field.startsWith('counter') ? 'counter' : field;
  const placed = columns.find(({ column }) => column.field === meant);
  if (placed) return placed.header;
  const column = earlierColumns.find((one) => one.field === meant);
  return column ? (headersOf(column)[0] ?? null) : null;
}

const cellOf = ({ index, header, unit }: PlacedColumn, cells: string[]): Cell => ({
  header,
  unit,
  text: (cells[index] ?? '').trim(),
});

const filledCells = ({ columns }: Table, column: EarlierColumn, cells: string[]): Cell[] => {
  const placed = columns.filter((one) => one.column === column).map((one) => cellOf(one, cells));
  const filled = placed.filter(({ text }) => text !== '');
  return filled.length > 0 ? filled : placed.slice(0, 1);
};

type ReadColumn = { value: CellValue; unit?: string } | { header: string; message: string };

function readColumn(column: EarlierColumn, cells: Cell[], ratedAh: number | undefined): ReadColumn {
  const [cell, second] = cells;
  const empty = column.field === 'note' ? '' : null;
  if (!cell) return { value: empty };
  if (second)
    return { header: second.header, message: `Give it once: ${cell.header} is filled in this row too.` };
  if (cell.text === '')
    return column.isOptional ? { value: empty } : { header: cell.header, message: 'This is needed.' };
  const read = readCell(column, cell, ratedAh);
  return read.ok
    ? { value: read.value, unit: cell.unit?.suffix }
    : { header: cell.header, message: read.message };
}

function readSources(
  table: Table,
  cells: string[],
  values: Map<EarlierField, CellValue>,
  problems: RowProblem[],
): CheckFields['sources'] {
  const sources: CheckFields['sources'] = { ...metered };
  const saidBy = new Map<string, string>();
  for (const { name, source } of sourceColumns) {
    const place = table.sourceColumns.get(name);
    const named = (place === undefined ? '' : (cells[place] ?? '')).split(/[\s,;]+/).filter(Boolean);
    for (const word of named) {
      const field = sourcedField(word);
      const refuse = (message: string) => problems.push({ column: name, message });
      if (!field) refuse(`"${word.slice(0, 40)}" is no column of figures.`);
      else if (saidBy.has(field)) refuse(`${word} stands in ${saidBy.get(field)} too.`);
      else {
        saidBy.set(field, name);
        sources[field] = source satisfies FieldSource;
      }
    }
  }
  const isFilled = (field: string) =>
    values.get((field === 'counterValue' ? 'counter' : field) as EarlierField) !== null;
  return Object.fromEntries(Object.entries(sources).filter(([field]) => isFilled(field)));
}

function sourcedField(word: string) {
  const plain = word.toLowerCase();
  const column = earlierColumns.find((one) => one.name === plain || headersOf(one).includes(plain));
  const field = column?.field === 'counter' ? 'counterValue' : column?.field;
  return checkSourcedFieldsSchema.safeParse(field).data;
}

const readingNames = new Set<string>(Object.keys(enteredFieldsSchema.shape.reading.shape));

function assemble(
  values: Map<EarlierField, CellValue>,
  counterKind: string | null,
  sources: CheckFields['sources'],
) {
  const { bank: _bank, note, counter, temperatureOf, ...rest } = Object.fromEntries(values);
  const part = (isReading: boolean) =>
    Object.fromEntries(Object.entries(rest).filter(([field]) => readingNames.has(field) === isReading));
  return {
    reading: part(true),
    conditions: {
      ...part(false),
      temperatureOf: temperatureOf ?? undefined,
      counterKind,
      counterValue: counter ?? null,
    },
    sources,
    note,
  };
}
