import type { Transaction } from 'sequelize';
import type { z } from 'zod';

import type { CheckState } from '@/lib/contract/checks';
import type { decisionRequestSchema } from '@/lib/contract/moderation';

import { rescreenOpenChecks } from '../checks/rescreenOpenChecks';
import { Check, User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { requestRefit } from '../fits/requestRefit';
import { queueNotice } from '../mail/queueNotice';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { approvedNotice, sentBackNotice, turnedAwayNotice } from './notices';
import { findDecidable } from './queries';

type Decision = z.output<typeof decisionRequestSchema>;
type Decidable = NonNullable<Awaited<ReturnType<typeof findDecidable>>>;

const outcomes = {
  approve: 'approved',
  sendBack: 'sentBack',
  turnAway: 'turnedAway',
} as const satisfies Record<Decision['action'], CheckState>;

/**
 * Decides on a submission: state, trail, notice to the owner and, when approved, the request for a refit are one
 * transaction. Of two moderators the first wins.
 * @throws AppError notFound, notAllowed (own check), alreadyDecided, versionConflict (changed since), conflict (withdrawn)
 */
export async function decide(
  deps: Deps,
  actor: SignedInActor,
  checkId: string,
  decision: Decision,
): Promise<{ state: CheckState; version: number }> {
  return deps.db.transaction(async (transaction) => {
    const check = await findDecidable(checkId, transaction);
    if (!check) throw new AppError('notFound');
    if (check.bank.ownerId === actor.userId)
      throw new AppError('notAllowed', 'This check is your own. Another moderator decides on it.');
    refuseUnlessOpen(check, decision.version);
    const state = outcomes[decision.action];
    const version = decision.version + 1;
    const at = deps.clock();
    const decidedAt = state === 'sentBack' ? null : at;
    await moveState(check, { state, version, decidedAt }, transaction);
    const details =
      decision.action === 'sendBack'
        ? { question: decision.question }
        : decision.action === 'turnAway'
          ? { reason: decision.reason }
          : {};
    const entry = { actor, at, subjectType: 'check', subjectId: checkId, action: state } as const;
    await appendTrail({ ...entry, details: { ...details, version } }, transaction);
    await notifyOwner(deps, check, { decision, version }, transaction);
    // The bank's other open checks are judged by those that stand.
    if (state !== 'sentBack') await rescreenOpenChecks(deps, check.bankId, transaction, checkId);
    if (state === 'approved') await requestRefit(deps, transaction);
    return { state, version };
  });
}

function refuseUnlessOpen({ state, version }: Check, seenVersion: number): void {
  if (state === 'withdrawn') throw new AppError('conflict', 'The owner has withdrawn this check.');
  const isOpen = state === 'submitted' || state === 'sentBack';
  if (!isOpen) throw new AppError('alreadyDecided');
  if (version === seenVersion) return;
  if (state === 'sentBack') throw new AppError('alreadyDecided');
  throw new AppError(
    'versionConflict',
    'The check has changed since you opened it. Reload to see it as it is now.',
  );
}

/** Guarded by the version once more, for databases on which transactions run beside each other. */
async function moveState(
  check: Check,
  to: Pick<Check, 'state' | 'version' | 'decidedAt'>,
  transaction: Transaction,
): Promise<void> {
  const where = { id: check.id, version: to.version - 1, state: check.state };
  const [moved] = await Check.update(to, { where, transaction });
  if (moved !== 1) throw new AppError('alreadyDecided');
}

async function notifyOwner(
  deps: Deps,
  { id, testedOn, bank }: Decidable,
  { decision, version }: { decision: Decision; version: number },
  transaction: Transaction,
): Promise<void> {
  const owner = await User.findByPk(bank.ownerId, { rejectOnEmpty: true, transaction });
  const subject = {
    cellTypeName: bank.cellType.name,
    testedOn,
    isPooled: bank.bought === 'new',
    link: `${deps.config.publicUrl}/banks/${bank.id}`,
  };
  const notice =
    decision.action === 'sendBack'
      ? sentBackNotice(subject, decision.question)
      : decision.action === 'turnAway'
        ? turnedAwayNotice(subject, decision.reason)
        : approvedNotice(subject);
  const onceKey = `decision:${id}:${version}`;
  await queueNotice(deps, owner, { kind: 'decisions', ...notice, onceKey }, transaction);
}
