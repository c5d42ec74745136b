import type { Transaction } from 'sequelize';

import { evaluateCheck, fieldsOf, replaceFindings } from '../checks/evaluateCheck';
import type { Check, CheckBefore } from '../db/models';
import type { Deps } from '../deps';
import type { DecidableCheck } from './queries';

/** The columns that bring a check back to how it stood; its findings are made anew where its reading changes. */
export async function columnsBefore(
  deps: Deps,
  { check, before }: { check: DecidableCheck; before: CheckBefore },
  transaction: Transaction,
): Promise<Partial<Check>> {
  const { state, isRealFailure, correction, reading } = before;
  const decidedAt = before.decidedAt === null ? null : new Date(before.decidedAt);
  const columns = { state, decidedAt, isRealFailure, correction, reading, mergedIntoId: null };
  if (check.correction === null) return columns;
  const { id: checkId, bank, upload, submittedAt } = check;
  const fields = { ...fieldsOf(check), reading };
  const evaluated = await evaluateCheck(deps, { bank, fields, upload, checkId, submittedAt }, transaction);
  await replaceFindings(checkId, evaluated.findings, transaction);
  return { ...columns, ...evaluated.columns };
}
