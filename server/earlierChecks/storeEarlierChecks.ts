import { randomUUID } from 'node:crypto';

import type { Transaction } from 'sequelize';

import type { CheckFields } from '@/lib/contract/checks';
import type { EarlierChoice, EarlierReport, RowProblem } from '@/lib/contract/earlierChecks';
import { limits } from '@/lib/contract/limits';

import { findBanksOf, findOwnBank, type LoadedBank } from '../banks/queries';
import { findStandingOfDay } from '../checks/queries';
import { rescreenOpenChecks } from '../checks/rescreenOpenChecks';
import { storeSubmission } from '../checks/storeSubmission';
import type { Check } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { bankNameIn, findBank } from './findBank';
import { headerFor, readRow } from './readRow';
import type { Table, TableRow } from './readTable';
import { presentReport } from './present';

interface EarlierRequest {
  table: Table;
  /** The bank that all rows are of; null where each row has to say. */
  bankId: string | null;
  /** `preview` stores nothing, and answers what storing the good rows would. */
  choice: EarlierChoice | 'preview';
  /** Version of the data licence that was agreed to. */
  consent: number;
}

/** What became of a row. */
export interface RowResult {
  row: TableRow;
  bankName: string;
  bank?: LoadedBank;
  testedOn?: string;
  problems: RowProblem[];
  /** Stored now. */
  storedId?: string;
  /** Stood there before, with the same figures. */
  thereId?: string;
  /** The row of this file that it repeats. */
  repeats?: number;
}

interface ReadyRow extends RowResult {
  bank: LoadedBank;
  fields: CheckFields;
}

/** Undoes what was tried, and carries out what came of it. */
class TriedOnly extends Error {
  constructor(readonly report: EarlierReport) {
    super('tried only');
  }
}

/**
 * Stores the checks of a file as the form would have sent them, each bank's in order of their day, so that each is
 * computed and screened by those before it. One transaction: with `allOrNothing` a row with a problem keeps all out.
 * Rows whose check stands there already are named and not stored again.
 * @returns what became of each row
 * @throws AppError notFound, invalid (too many of one bank)
 */
export async function storeEarlierChecks(
  deps: Deps,
  actor: SignedInActor,
  request: EarlierRequest,
): Promise<EarlierReport> {
  try {
    return await deps.db.transaction(async (transaction) => {
      const results = await storeRows(deps, actor, request, transaction);
      const { choice, table } = request;
      const hasProblem = results.some(({ problems }) => problems.length > 0);
      const isStored = choice === 'goodRows' || (choice === 'allOrNothing' && !hasProblem);
      const report = await presentReport(table, results, isStored, transaction);
      if (isStored) return report;
      throw new TriedOnly(report);
    });
  } catch (error) {
    if (error instanceof TriedOnly) return error.report;
    throw error;
  }
}

async function storeRows(
  deps: Deps,
  actor: SignedInActor,
  { table, bankId, consent }: EarlierRequest,
  transaction: Transaction,
): Promise<RowResult[]> {
  const only = bankId === null ? undefined : await findOwnBank(actor, 'checks.create', bankId, transaction);
  const banks = await findBanksOf(actor.userId, transaction);
  const read = table.rows.map((row) => readOne(table, row, findBank(bankNameIn(table, row), banks, only)));
  const ready = read.filter((one): one is ReadyRow => 'fields' in one).sort(byBankAndDay);
  refuseTooMany(ready);
  for (const one of ready) await storeOne(one);
  for (const id of new Set(ready.filter(({ storedId }) => storedId).map(({ bank }) => bank.id)))
    await rescreenOpenChecks(deps, id, transaction);
  return read;

  async function storeOne(one: ReadyRow): Promise<void> {
    const { bank, fields, row } = one;
    const twin = await findStandingOfDay(bank.id, fields.reading.testedOn, transaction);
    if (twin) return settleTwin(table, one, twin, ready);
    const fromFile = { digest: table.digest, row: row.row };
    const submission = { bank, entered: fields, idempotencyKey: randomUUID(), consent, fromFile };
    try {
      one.storedId = await storeSubmission(deps, actor, submission, transaction);
    } catch (error) {
      if (!(error instanceof AppError)) throw error;
      one.problems = problemsOf(table, error);
    }
  }
}

function readOne(table: Table, row: TableRow, found: ReturnType<typeof findBank>): RowResult | ReadyRow {
  const bankName = bankNameIn(table, row);
  // A row of no bank is read all the same, so that all of its problems are told at once.
  const ratedAh = found.bank ? found.bank.cellType.ratedAh * found.bank.parallel : undefined;
  const read = readRow(table, row, ratedAh);
  if (!found.bank) return { row, bankName, problems: [found.problem, ...read.problems] };
  const { bank } = found;
  if (!read.ok) return { row, bankName, bank, problems: read.problems };
  return { row, bankName, bank, problems: [], fields: read.fields, testedOn: read.fields.reading.testedOn };
}

const byBankAndDay = (one: ReadyRow, other: ReadyRow) =>
  one.bank.id.localeCompare(other.bank.id) ||
  one.fields.reading.testedOn.localeCompare(other.fields.reading.testedOn) ||
  one.row.row - other.row.row;

function refuseTooMany(ready: readonly ReadyRow[]): void {
  const { max } = limits.tableRowsOfBank;
  const seen = new Map<string, number>();
  for (const { bank } of ready) {
    const count = (seen.get(bank.id) ?? 0) + 1;
    seen.set(bank.id, count);
    if (count <= max) continue;
    const message = `The file has more than ${max} checks of ${bank.name}. Send ${max} of a bank at once, the oldest first.`;
    throw new AppError('invalid', message, { file: message });
  }
}

/** A check of this day stands: this row's own from before, another row's, or another one. */
function settleTwin(table: Table, one: ReadyRow, twin: Check, ready: readonly ReadyRow[]): void {
  const earlier = ready.find(({ storedId }) => storedId === twin.id)?.row.row;
  if (isSame(one.fields, twin)) {
    one.thereId = twin.id;
    one.repeats = earlier;
    return;
  }
  const message =
    earlier === undefined
      ? 'A check of this day is there already, with other figures. Correct that one, or give another day.'
      : `Row ${earlier} is of the same bank and day, with other figures.`;
  one.problems = [{ column: headerFor(table, 'testedOn'), message }];
}

/** Held against the owner's own figures, whatever a moderator put right since. */
function isSame({ reading, conditions }: CheckFields, twin: Check): boolean {
  const own = { ...twin.reading, ...twin.correction?.before };
  return alike(reading, own) && alike(conditions, twin.conditions);
}

const alike = (one: object, other: object) => {
  const others = new Map<string, unknown>(Object.entries(other));
  return Object.entries(one).every(([key, value]) => others.get(key) === value);
};

const problemsOf = (table: Table, { message, fields }: AppError): RowProblem[] =>
  Object.keys(fields).length === 0
    ? [{ column: null, message }]
    : Object.entries(fields).map(([path, text]) => ({
        column: headerFor(table, path.split('.').at(-1) ?? path),
        message: text,
      }));
