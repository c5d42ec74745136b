import Papa from 'papaparse';

import {
  allowedWords,
  type EarlierColumn,
  earlierColumns,
  headerOf,
  headersOf,
  rangeText,
  sourceColumns,
} from '@/lib/contract/earlierColumns';

/** A bank's name is its owner's own words. */
const formulas = /^[=@+-]/;

interface TemplateStyle {
  style: 'point' | 'comma';
  /** Names of the account's banks. */
  bankNames: readonly string[];
}

/**
 * An empty file of earlier checks: row 1 with its columns, an example and what each column holds as remarks, which are
 * not read. With decimal commas the values are set apart by semicolons, as spreadsheets do that write them.
 */
export function earlierTemplate({ style, bankNames }: TemplateStyle): string {
  const header = [...earlierColumns.flatMap(templateHeaders), ...sourceColumns.map(({ name }) => name)];
  const lines = [
    header,
    exampleRow(style, bankNames[0]),
    ['# Rows that begin with # are not read. Write one check in a row, under the names in row 1.'],
    ...(bankNames.length > 0 ? [[`# Your banks: ${bankNames.join('; ')}`]] : []),
    ...earlierColumns.map((column) => [remarkOn(column)]),
    ...sourceColumns.map(({ name, meaning }) => [
      `# ${name}: ${meaning}, by name, with a space between. Charge, energy, current and duration count as metered unless said.`,
    ]),
  ];
  const delimiter = style === 'comma' ? ';' : ',';
  // A spreadsheet tells UTF-8 by its mark.
  return `\ufeff${Papa.unparse(lines, { delimiter, newline: '\r\n', escapeFormulae: formulas })}\r\n`;
}

const templateHeaders = (column: EarlierColumn): string[] =>
  column.field === 'counter' ? headersOf(column) : [headerOf(column, column.units[0])];

function exampleRow(style: TemplateStyle['style'], bankName: string | undefined): string[] {
  const figures = (text: string) => (style === 'comma' ? text.replace('.', ',') : text);
  const cells = earlierColumns.flatMap((column) => {
    const isFigure = column.kind === 'quantity' || column.kind === 'duration';
    const example = column.field === 'bank' ? (bankName ?? column.example) : column.example;
    const shown = isFigure ? figures(example) : example;
    return templateHeaders(column).map((_header, index) => (index === 0 ? shown : ''));
  });
  const [day = '', ...rest] = cells;
  const sources = ['capacity_ah energy_kwh', 'soc_mean_percent', 'depth_percent temperature_mean_c'];
  return [`# example ${day}`, ...rest, ...sources];
}

function remarkOn(column: EarlierColumn): string {
  const [, ...others] = column.units;
  const also =
    others.length > 0
      ? ` Or ${others.map((unit) => `${headerOf(column, unit)} (${unit.unit})`).join(', ')}.`
      : '';
  const need = column.isOptional ? 'may stay empty' : 'needed';
  const allowed = column.field === 'counter' ? counterWords(column) : allowedWords(column);
  return `# ${headerOf(column, column.units[0])}: ${column.meaning}; ${allowed}; ${need}.${also}`;
}

const counterWords = ({ units }: EarlierColumn) => units.map((unit) => rangeText(unit)).join(', or ');
