import Papa from 'papaparse';
import type { Transaction } from 'sequelize';

import type { EarlierReport, EarlierRow } from '@/lib/contract/earlierChecks';
import { problemColumn } from '@/lib/contract/earlierColumns';

import { Check, Finding } from '../db/models';
import type { Table } from './readTable';
import type { RowResult } from './storeEarlierChecks';

/** What became of a file, row by row, with what the stored checks come to. */
export async function presentReport(
  table: Table,
  results: readonly RowResult[],
  isStored: boolean,
  transaction: Transaction,
): Promise<EarlierReport> {
  const checks = await findStored(results, transaction);
  const rows = results.map((result) => presentRow(table, result, checks, isStored));
  const count = (outcome: EarlierRow['outcome']) => rows.filter((row) => row.outcome === outcome).length;
  return {
    ...{ digest: table.digest, isStored, rows, notes: table.notes },
    counts: { good: count('good'), there: count('there'), problem: count('problem') },
    leftOver: leftOver(table, results),
  };
}

async function findStored(
  results: readonly RowResult[],
  transaction: Transaction,
): Promise<Map<string, Check>> {
  const ids = results.flatMap(({ storedId, thereId }) => storedId ?? thereId ?? []);
  const include = [{ model: Finding, as: 'findings' }];
  const checks = await Check.findAll({ where: { id: ids }, include, transaction });
  return new Map(checks.map((check) => [check.id, check]));
}

function presentRow(
  table: Table,
  { row, bank, bankName, testedOn, problems, storedId, thereId, repeats }: RowResult,
  checks: Map<string, Check>,
  isStored: boolean,
): EarlierRow {
  const check = checks.get(storedId ?? thereId ?? '');
  const place = table.columns.find(({ column }) => column.field === 'testedOn')?.index ?? 0;
  const remarks = storedId ? remarksOf(check) : [];
  return {
    ...{ row: row.row, problems },
    bankId: bank?.id ?? null,
    bankName: bank?.name ?? bankName,
    testedOn: testedOn ?? (row.cells[place] ?? '').trim(),
    outcome: problems.length > 0 ? 'problem' : thereId ? 'there' : 'good',
    // What was tried only has no check that could be opened.
    checkId: (isStored || (thereId && repeats === undefined) ? check?.id : null) ?? null,
    capacityRefAh: check?.computed.capacityRefAh ?? null,
    sohFraction: check?.sohFraction ?? null,
    remarks: repeats === undefined ? remarks : [`The same as row ${repeats}; it counts once.`],
  };
}

const remarksOf = (check: Check | undefined): string[] =>
  [...(check?.findings ?? [])]
    .filter(({ severity }) => severity > 0)
    .sort((one, other) => other.severity - one.severity || one.rule.localeCompare(other.rule))
    .map(({ title, ownerText }) => `${title}: ${ownerText}`);

/** What a spreadsheet would compute. */
const formulas = /^[=@]/;

function leftOver(table: Table, results: readonly RowResult[]): string | null {
  const left = results.filter(({ problems }) => problems.length > 0);
  if (left.length === 0) return null;
  const kept = table.header.flatMap((name, index) => (name.toLowerCase() === problemColumn ? [] : index));
  const data = left.map(({ row, problems }) => [
    ...kept.map((index) => row.cells[index] ?? ''),
    problems.map(({ column, message }) => (column ? `${column}: ${message}` : message)).join(' '),
  ]);
  const fields = [...kept.map((index) => table.header[index]!), problemColumn];
  const style = { delimiter: table.delimiter, newline: '\r\n', escapeFormulae: formulas };
  return `\ufeff${Papa.unparse({ fields, data }, style)}\r\n`;
}
