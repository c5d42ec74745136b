import type { CheckFields } from '@/lib/contract/checks';

import { findOwnBank } from '../banks/queries';
import { Check } from '../db/models';
import type { Deps } from '../deps';
import type { Actor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { admitFields } from './admitFields';
import { evaluateCheck, replaceFindings } from './evaluateCheck';
import { rescreenOpenChecks } from './rescreenOpenChecks';

/**
 * Stores a check of the actor's bank with its findings, and its first entry whole in the trail. A repeat under the
 * same key answers the check stored then.
 * @returns the check's id
 * @throws AppError notFound, invalid, conflict
 */
export async function submitCheck(
  deps: Deps,
  actor: Extract<Actor, { userId: string }>,
  bankId: string,
  { idempotencyKey, consent, ...entered }: CheckFields & { idempotencyKey: string; consent: number },
): Promise<string> {
  return deps.db.transaction(async (transaction) => {
    const bank = await findOwnBank(actor, 'checks.create', bankId, transaction);
    const stored = await Check.findOne({ where: { bankId, idempotencyKey }, transaction });
    if (stored) return stored.id;
    const admitted = await admitFields(deps, { bank, fields: entered, checkId: null }, transaction);
    const { fields, upload, edited } = admitted;
    const evaluation = await evaluateCheck(deps, { bank, fields, upload, checkId: null }, transaction);
    const { testedOn } = fields.reading;
    const at = deps.clock();
    const check = await Check.create(
      {
        ...fields,
        ...evaluation.columns,
        bankId,
        idempotencyKey,
        consentVersion: consent,
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
    await appendTrail({ ...entry, details, texts: { note } }, transaction);
    await rescreenOpenChecks(deps, bankId, transaction, check.id);
    return check.id;
  });
}
