import type { Transaction } from 'sequelize';
import type { z } from 'zod';

import { type recallAtOnceRequestSchema } from '@/lib/contract/steward';

import { rescreenOpenChecks } from '../checks/rescreenOpenChecks';
import { Check, type CheckBefore, Claim, Decision, Proposal, PublicMember } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { requestRefit } from '../fits/requestRefit';
import { leaveAtOnce } from '../pool/leaveAtOnce';
import { authorizeRecord, type SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { type DecidableCheck, findDecidable } from './queries';

/**
 * Takes an approved check, or one recalled before, out of the public pool at once, without waiting for the changes of
 * other owners: the public figures move by this one check, so the reason is recorded. There is no undoing it.
 * @returns whether it was public
 * @throws AppError notFound, notAllowed, versionConflict, conflict (it is in neither pool)
 */
export async function recallAtOnce(
  deps: Deps,
  actor: SignedInActor,
  checkId: string,
  { version, reason }: z.output<typeof recallAtOnceRequestSchema>,
): Promise<{ wasPublic: boolean }> {
  return deps.db.transaction(async (transaction) => {
    const check = await findDecidable(checkId, transaction);
    if (!check) throw new AppError('notFound');
    authorizeRecord(actor, 'screening.recallAtOnce', check.bank);
    const wasPublic = (await PublicMember.count({ where: { checkId }, transaction })) > 0;
    const isApproved = check.state === 'approved';
    if (!isApproved && !wasPublic)
      throw new AppError('conflict', 'This check is neither in the working pool nor in the public one.');
    if (check.version !== version) throw new AppError('versionConflict');
    const at = deps.clock();
    if (isApproved) await recall(deps, { actor, check, reason, at }, transaction);
    if (wasPublic) await leaveAtOnce(checkId, at, transaction);
    await appendTrail(
      {
        ...{ actor, at, subjectType: 'check', subjectId: checkId, action: 'recalledAtOnce' },
        details: { reason, version: isApproved ? version + 1 : version, wasPublic },
      },
      transaction,
    );
    await requestRefit(deps, transaction);
    return { wasPublic };
  });
}

interface Recall {
  actor: SignedInActor;
  check: DecidableCheck;
  reason: string;
  at: Date;
}

/** A decision like others, except that it takes effect now: the owner is told, and nothing can be undone. */
async function recall(
  deps: Deps,
  { actor, check, reason, at }: Recall,
  transaction: Transaction,
): Promise<void> {
  const { id: checkId, bankId, state, decidedAt, isRealFailure, correction, reading } = check;
  const before: CheckBefore = {
    ...{ state, decidedAt: decidedAt?.toISOString() ?? null, isRealFailure, correction, reading },
  };
  const version = check.version + 1;
  await Check.update({ state: 'recalled', version, decidedAt: at }, { where: { id: checkId }, transaction });
  await Claim.destroy({ where: { checkId }, transaction });
  await Proposal.destroy({ where: { checkId }, transaction });
  const decision = await Decision.create(
    {
      ...{ checkId, moderatorId: actor.userId, action: 'recall', words: reason, version, before },
      ...{ decidedAt: at, takesEffectAt: at },
    },
    { transaction },
  );
  await deps.jobs.enqueue({ kind: 'settleDecision', payload: { decisionId: decision.id } }, transaction);
  await rescreenOpenChecks(deps, bankId, transaction, checkId);
}
