import type { CheckFields } from '@/lib/contract/checks';

import { findOwnBank } from '../banks/queries';
import { Check } from '../db/models';
import type { Deps } from '../deps';
import type { SignedInActor } from '../policies';
import { rescreenOpenChecks } from './rescreenOpenChecks';
import { storeSubmission } from './storeSubmission';

/**
 * Stores a check of the actor's bank with its findings, and its first entry whole in the trail. A repeat under the
 * same key answers the check stored then.
 * @returns the check's id
 * @throws AppError notFound, invalid, conflict
 */
export async function submitCheck(
  deps: Deps,
  actor: SignedInActor,
  bankId: string,
  { idempotencyKey, consent, ...entered }: CheckFields & { idempotencyKey: string; consent: number },
): Promise<string> {
  return deps.db.transaction(async (transaction) => {
    const bank = await findOwnBank(actor, 'checks.create', bankId, transaction);
    const stored = await Check.findOne({ where: { bankId, idempotencyKey }, transaction });
    if (stored) return stored.id;
    const submission = { bank, entered, idempotencyKey, consent };
    const checkId = await storeSubmission(deps, actor, submission, transaction);
    await rescreenOpenChecks(deps, bankId, transaction, checkId);
    return checkId;
  });
}
