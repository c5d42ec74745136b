import type { Transaction } from 'sequelize';
import type { z } from 'zod';

import { type decisionRequestSchema, type DecisionResult, undoSeconds } from '@/lib/contract/moderation';

import { rescreenOpenChecks } from '../checks/rescreenOpenChecks';
import { Check, type CheckBefore, Claim, Decision, Proposal } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { actions, trailActions } from './actions';
import { applyCorrection } from './applyCorrection';
import { refuseIfClaimed } from './claims';
import { type DecidableCheck, findDecidable } from './queries';
import { agreeOrPropose } from './secondOpinion';
import { findWorkingPool } from './workingPool';

type Request = z.output<typeof decisionRequestSchema>;

/**
 * Decides on a check: state, trail and what follows later are one transaction. Mail and refit wait until the decision
 * can't be undone any more. Of two moderators the first wins.
 * @throws AppError notFound, notAllowed (own check), alreadyDecided, versionConflict (changed since), conflict
 * (withdrawn, or another moderator is at work on it), invalid
 */
export async function decide(
  deps: Deps,
  actor: SignedInActor,
  checkId: string,
  request: Request,
): Promise<DecisionResult> {
  return deps.db.transaction(async (transaction) => {
    const check = await findDecidable(checkId, transaction);
    if (!check) throw new AppError('notFound');
    if (check.bank.ownerId === actor.userId)
      throw new AppError('notAllowed', 'This check is your own. Another moderator decides on it.');
    refuseUnlessFits(check, request);
    const at = deps.clock();
    await refuseIfClaimed({ checkId, actor, at }, transaction);
    if (await isProposal(deps, { actor, check, request, at }, transaction)) {
      await Claim.destroy({ where: { checkId }, transaction });
      const { state, version } = check;
      return { state, version, isProposed: true, decisionId: null, undoUntil: null };
    }
    return carryOut(deps, { actor, check, request, at }, transaction);
  });
}

interface Case {
  actor: SignedInActor;
  check: DecidableCheck;
  request: Request;
  at: Date;
}

async function carryOut(
  deps: Deps,
  { actor, check, request, at }: Case,
  transaction: Transaction,
): Promise<DecisionResult> {
  const { id: checkId, bankId } = check;
  const before = beforeOf(check);
  const state = actions[request.action].to(check.state);
  const version = request.version + 1;
  const changes = await changesOf(deps, { check, request, at }, transaction);
  await move(check, { ...changes, state, version, decidedAt: state === 'sentBack' ? null : at }, transaction);
  const words = wordsOf(request);
  const entry = { actor, at, subjectType: 'check', subjectId: checkId } as const;
  const details = {
    ...detailsOf(request),
    ...(changes.correction ? { correction: changes.correction } : {}),
  };
  await appendTrail(
    { ...entry, action: trailActions[request.action], details: { ...details, version } },
    transaction,
  );
  if (request.action === 'merge')
    await appendTrail(
      { ...entry, subjectId: request.intoCheckId, action: 'duplicateMerged', details: { checkId } },
      transaction,
    );
  await Promise.all([
    Claim.destroy({ where: { checkId }, transaction }),
    Proposal.destroy({ where: { checkId }, transaction }),
  ]);
  const takesEffectAt = new Date(at.getTime() + undoSeconds * 1000);
  const decision = await Decision.create(
    {
      ...{ checkId, moderatorId: actor.userId, action: request.action, words, version, before },
      ...{ decidedAt: at, takesEffectAt },
    },
    { transaction },
  );
  await deps.jobs.enqueue(
    { kind: 'settleDecision', payload: { decisionId: decision.id }, runAfter: takesEffectAt },
    transaction,
  );
  // The bank's other open checks are judged by those that stand.
  if (state !== 'sentBack') await rescreenOpenChecks(deps, bankId, transaction, checkId);
  return {
    state,
    version,
    isProposed: false,
    decisionId: decision.id,
    undoUntil: takesEffectAt.toISOString(),
  };
}

function refuseUnlessFits({ state, version }: Check, { action, version: seen }: Request): void {
  if (state === 'withdrawn') throw new AppError('conflict', 'The owner has withdrawn this check.');
  if (!actions[action].from.includes(state)) throw new AppError('alreadyDecided');
  if (version === seen) return;
  if (state !== 'submitted') throw new AppError('alreadyDecided');
  throw new AppError(
    'versionConflict',
    'The check has changed since you opened it. Reload to see it as it is now.',
  );
}

/** Turning away or recalling where much hangs on it takes two; the first to say so proposes. */
async function isProposal(
  deps: Deps,
  { actor, check, request, at }: Case,
  transaction: Transaction,
): Promise<boolean> {
  if (request.action !== 'turnAway' && request.action !== 'recall') return false;
  const influence = (await findWorkingPool(deps))?.influence.get(check.bankId);
  if (!influence) return false;
  const { reason, version } = request;
  const outcome = await agreeOrPropose({ actor, checkId: check.id, version, reason, at }, transaction);
  if (outcome === 'agreed') return false;
  const entry = { actor, at, subjectType: 'check', subjectId: check.id } as const;
  await appendTrail(
    { ...entry, action: `${request.action}Proposed`, details: { reason, influence } },
    transaction,
  );
  return true;
}

type Changes = Partial<Check>;

/** What a decision changes on the check besides its state. */
async function changesOf(
  deps: Deps,
  { check, request, at }: Omit<Case, 'actor'>,
  transaction: Transaction,
): Promise<Changes> {
  switch (request.action) {
    case 'correct':
      return applyCorrection(deps, { check, ...request, at }, transaction);
    case 'realFailure':
      return { isRealFailure: true };
    case 'merge':
      return { mergedIntoId: await findTwin(check, request.intoCheckId, transaction) };
    default:
      return {};
  }
}

async function findTwin(
  { id, bankId }: Check,
  intoCheckId: string,
  transaction: Transaction,
): Promise<string> {
  const twin = await Check.findOne({
    where: { id: intoCheckId, bankId, state: ['submitted', 'sentBack', 'approved'] },
    transaction,
  });
  if (twin && twin.id !== id) return twin.id;
  throw new AppError('invalid', undefined, {
    intoCheckId: 'Choose another check of this bank that still stands.',
  });
}

/** Guarded by the version once more, for databases on which transactions run beside each other. */
async function move(
  check: Check,
  to: Changes & Pick<Check, 'version'>,
  transaction: Transaction,
): Promise<void> {
  const where = { id: check.id, version: to.version - 1, state: check.state };
  const [moved] = await Check.update(to, { where, transaction });
  if (moved !== 1) throw new AppError('alreadyDecided');
}

function beforeOf({ state, decidedAt, isRealFailure, correction, reading }: Check): CheckBefore {
  return { state, decidedAt: decidedAt?.toISOString() ?? null, isRealFailure, correction, reading };
}

function wordsOf(request: Request): string {
  if (request.action === 'sendBack') return request.question;
  if (request.action === 'realFailure') return request.note;
  return 'reason' in request ? request.reason : '';
}

/** What the trail keeps of the request beside the version. */
function detailsOf(request: Request): Record<string, unknown> {
  const into = request.action === 'merge' ? { intoCheckId: request.intoCheckId } : {};
  const words = wordsOf(request);
  if (words === '') return into;
  return { ...into, [request.action === 'sendBack' ? 'question' : 'reason']: words };
}
