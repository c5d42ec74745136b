import type { Transaction } from 'sequelize';
import { z } from 'zod';

import { drawForReview } from '../agreement/drawForReview';
import { presentCellTypeBrief } from '../cellTypes/present';
import { Decision, User } from '../db/models';
import type { Deps } from '../deps';
import { requestRefit } from '../fits/requestRefit';
import type { JobHandler } from '../jobs/JobRunner';
import { queueNotice } from '../mail/queueNotice';
import { actions } from './actions';
import { noticeOf } from './notices';
import { findDecidable } from './queries';

const payloadSchema = z.object({ decisionId: z.string() });

/** Job: what follows a decision once it can't be undone: the owner's mail, a second look where it is
 * drawn, and a refit where the pool changes. */
export function settleDecision(deps: Deps): JobHandler {
  return async (payload) => {
    const { decisionId } = payloadSchema.parse(payload);
    await deps.db.transaction(async (transaction) => {
      const decision = await Decision.findByPk(decisionId, { transaction });
      if (!decision || decision.undoneAt) return;
      await notifyOwner(deps, decision, transaction);
      await drawForReview(deps, decision, transaction);
      if (touchesPool(decision)) await requestRefit(deps, transaction);
    });
  };
}

/** Whether a decision put a check into the pool, took it out, or changed what it is there. */
export function touchesPool({ action, before }: Pick<Decision, 'action' | 'before'>): boolean {
  return before.state === 'approved' || actions[action].to(before.state) === 'approved';
}

async function notifyOwner(deps: Deps, decision: Decision, transaction: Transaction): Promise<void> {
  const { checkId, version } = decision;
  const check = await findDecidable(checkId, transaction);
  // Overtaken within the half minute, by the owner or by another decision: that one is told of.
  if (!check || check.state !== actions[decision.action].to(decision.before.state)) return;
  const owner = await User.findByPk(check.bank.ownerId, { rejectOnEmpty: true, transaction });
  const subject = {
    cellTypeName: presentCellTypeBrief(check.bank.cellType).name,
    testedOn: check.testedOn,
    isPooled: check.bank.bought === 'new',
    link: `${deps.config.publicUrl}/banks/${check.bank.id}`,
  };
  const notice = noticeOf(decision, check.correction, subject);
  const onceKey = `decision:${checkId}:${version}`;
  await queueNotice(deps, owner, { kind: 'decisions', ...notice, onceKey }, transaction);
}
