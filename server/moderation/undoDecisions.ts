import type { Transaction } from 'sequelize';

import { columnsBefore } from './columnsBefore';
import { rescreenOpenChecks } from '../checks/rescreenOpenChecks';
import { Check, Decision } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { requestRefit } from '../fits/requestRefit';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { findDecidable } from './queries';
import { touchesPool } from './settleDecision';

interface Undone {
  decisionId: string;
  /** Why it stands, or null when it was undone. */
  problem: string | null;
}

/** Takes own decisions back while that is possible; each stands or falls by itself. */
export async function undoDecisions(
  deps: Deps,
  actor: SignedInActor,
  decisionIds: readonly string[],
): Promise<Undone[]> {
  const results: Undone[] = [];
  for (const decisionId of decisionIds) {
    try {
      await deps.db.transaction((transaction) => undo(deps, actor, decisionId, transaction));
      results.push({ decisionId, problem: null });
    } catch (error) {
      if (!(error instanceof AppError)) throw error;
      results.push({ decisionId, problem: error.message });
    }
  }
  return results;
}

async function undo(
  deps: Deps,
  actor: SignedInActor,
  decisionId: string,
  transaction: Transaction,
): Promise<void> {
  const decision = await Decision.findByPk(decisionId, { transaction });
  if (!decision || decision.moderatorId !== actor.userId)
    throw new AppError('notFound', 'This is no decision of yours.');
  const at = deps.clock();
  if (decision.undoneAt) throw new AppError('conflict', 'This decision was undone already.');
  if (decision.takesEffectAt <= at)
    throw new AppError('gone', 'It is too late to undo this one: what follows from it is under way.');
  const check = await findDecidable(decision.checkId, transaction);
  if (!check || check.version !== decision.version)
    throw new AppError('conflict', 'The check has changed since your decision.');
  const { before, version } = decision;
  const restored = await columnsBefore(deps, { check, before }, transaction);
  const [moved] = await Check.update(
    { ...restored, version: version + 1 },
    { where: { id: check.id, version }, transaction },
  );
  if (moved !== 1) throw new AppError('conflict');
  await decision.update({ undoneAt: at }, { transaction });
  const entry = { actor, at, subjectType: 'check', subjectId: check.id } as const;
  const details = { undone: decision.action, state: before.state, version: version + 1 };
  await appendTrail({ ...entry, action: 'decisionUndone', details }, transaction);
  await rescreenOpenChecks(deps, check.bankId, transaction, check.id);
  // A fit for another reason may have run in between; without one there is nothing to do anew.
  if (touchesPool(decision)) await requestRefit(deps, transaction);
}
