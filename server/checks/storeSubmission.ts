import type { Transaction } from 'sequelize';

import type { CheckFields } from '@/lib/contract/checks';

import type { LoadedBank } from '../banks/queries';
import { Check } from '../db/models';
import type { Deps } from '../deps';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { admitFields } from './admitFields';
import { evaluateCheck, replaceFindings } from './evaluateCheck';

interface Submission {
  bank: LoadedBank;
  entered: CheckFields;
  idempotencyKey: string;
  /** Version of the data licence that was agreed to. */
  consent: number;
  /** Where it stood in a file of earlier checks; typed into the form without it. */
  fromFile?: { digest: string; row: number };
}

/**
 * Admits, computes, screens and stores one check of a bank, with its first entry whole in the trail. The bank's other
 * waiting checks are left to be screened anew by the caller. A refusal is thrown before anything is written.
 * @returns the check's id
 * @throws AppError invalid, conflict
 */
export async function storeSubmission(
  deps: Deps,
  actor: SignedInActor,
  { bank, entered, idempotencyKey, consent, fromFile }: Submission,
  transaction: Transaction,
): Promise<string> {
  const admitted = await admitFields(deps, { bank, fields: entered, checkId: null }, transaction);
  const { fields, upload, edited } = admitted;
  const fileDigest = fromFile?.digest ?? null;
  const evaluation = await evaluateCheck(
    deps,
    { bank, fields, upload, checkId: null, fileDigest },
    transaction,
  );
  const { testedOn } = fields.reading;
  const at = deps.clock();
  const check = await Check.create(
    {
      ...fields,
      ...evaluation.columns,
      bankId: bank.id,
      idempotencyKey,
      consentVersion: consent,
      fileDigest,
      testedOn,
      state: 'submitted',
      submittedAt: at,
    },
    { transaction },
  );
  await replaceFindings(check.id, evaluation.findings, transaction);
  const entry = { actor, at, subjectType: 'check', subjectId: check.id, action: 'submitted' } as const;
  const { note, ...values } = entered;
  const { computed } = evaluation;
  const details = { entered: values, sources: fields.sources, edited, computed, consent };
  const origin = fromFile ? { fromFile } : {};
  await appendTrail({ ...entry, details: { ...details, ...origin }, texts: { note } }, transaction);
  return check.id;
}
