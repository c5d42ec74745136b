import Papa from 'papaparse';

import { checkSourcedFieldsSchema, conditionsSchema, readingSchema } from '@/lib/contract/checks';

import { findBanksOf } from '../banks/queries';
import { presentCellTypeBrief } from '../cellTypes/present';
import { findChecksOf, type LoadedCheck } from '../checks/queries';

type Cell = string | number | boolean | null | undefined;

const computedFields = [
  'ageYears',
  'efc',
  'efcFromCounter',
  'efcFromDepth',
  'efcDisagreement',
  'capacityRefAh',
  'sohFraction',
  'isCorrected',
  'meanIt',
  'meanTemperatureC',
  'meanCellV',
  'relSdMeter',
  'relSdNew',
  'expandedAh',
] as const;

const columns = [
  ...[
    'bankId',
    'bankName',
    'cellType',
    'checkId',
    'state',
    'submittedAt',
    'consentVersion',
    'uploadId',
    'photoId',
  ],
  ...readingSchema.keyof().options,
  ...conditionsSchema.keyof().options,
  ...checkSourcedFieldsSchema.options.map((field) => `${field}Source`),
  ...computedFields.map((field) => `computed.${field}`),
  ...['computed.budget', 'note'],
];

function rowOf(
  bank: { id: string; name: string },
  cellType: string,
  check: LoadedCheck,
): Record<string, Cell> {
  const sources = Object.entries(check.sources).map(([field, source]) => [`${field}Source`, source]);
  const computed = computedFields.map((field) => [`computed.${field}`, check.computed[field]]);
  return {
    bankId: bank.id,
    bankName: bank.name,
    cellType,
    checkId: check.id,
    state: check.state,
    submittedAt: check.submittedAt.toISOString(),
    consentVersion: check.consentVersion,
    uploadId: check.uploadId,
    photoId: check.photoId,
    ...check.reading,
    ...check.conditions,
    ...Object.fromEntries(sources),
    ...Object.fromEntries(computed),
    'computed.budget': JSON.stringify(check.computed.budget),
    note: check.note,
  };
}

/**
 * All checks of an account, one a line, every field in a column of its own. Text that a spreadsheet would take for a
 * formula begins with an apostrophe.
 */
export async function checksCsv(userId: string): Promise<string> {
  const rows: Record<string, Cell>[] = [];
  for (const bank of await findBanksOf(userId)) {
    const { maker, name } = presentCellTypeBrief(bank.cellType);
    const cellType = `${maker} ${name}`;
    for (const check of await findChecksOf(bank.id)) rows.push(rowOf(bank, cellType, check));
  }
  const data = rows.map((row) => columns.map((column) => row[column] ?? ''));
  return `${Papa.unparse({ fields: columns, data }, { newline: '\r\n', escapeFormulae: true })}\r\n`;
}
