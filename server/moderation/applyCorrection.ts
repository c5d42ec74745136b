import type { Transaction } from 'sequelize';

import type { Correctable, Correction } from '@/lib/contract/checks';

import { evaluateCheck, fieldsOf, replaceFindings } from '../checks/evaluateCheck';
import type { Check } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { DecidableCheck } from './queries';

interface CorrectionRequest {
  check: DecidableCheck;
  corrections: Correctable;
  reason: string;
  at: Date;
}

/**
 * Figures put right: the check's columns with the corrected reading and what follows from it, the owner's own figures
 * beside them. Its findings are made anew.
 * @throws AppError invalid where nothing would change
 */
export async function applyCorrection(
  deps: Deps,
  { check, corrections, reason, at }: CorrectionRequest,
  transaction: Transaction,
): Promise<Partial<Check>> {
  const { id: checkId, bank, upload, submittedAt, reading } = check;
  const keys = (Object.keys(corrections) as (keyof Correctable)[]).filter(
    (key) => corrections[key] !== undefined && corrections[key] !== reading[key],
  );
  if (keys.length === 0)
    throw new AppError('invalid', undefined, { corrections: 'These are the figures as they stand.' });
  const pick = (from: Correctable): Correctable => Object.fromEntries(keys.map((key) => [key, from[key]]));
  const correction: Correction = {
    before: pick(reading),
    after: pick(corrections),
    reason,
    correctedAt: at.toISOString(),
  };
  const corrected = { ...reading, ...correction.after };
  const fields = { ...fieldsOf(check), reading: corrected };
  const evaluated = await evaluateCheck(deps, { bank, fields, upload, checkId, submittedAt }, transaction);
  await replaceFindings(checkId, evaluated.findings, transaction);
  return { ...evaluated.columns, reading: corrected, correction };
}
