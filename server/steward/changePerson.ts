import type { Transaction } from 'sequelize';

import { assertPassword } from '../accounts/assertPassword';
import type { Mail } from '../accounts/mails';
import { User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { queueMail } from '../mail/queueMail';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';

interface Change {
  /** Whose account it is. */
  find: { id: string } | { email: string };
  currentPassword: string;
  /** In the steward's words. */
  reason?: string;
  /** Refuses, or changes the account; answers what the trail and its owner are told. */
  apply: (
    user: User,
    transaction: Transaction,
  ) => Promise<{ action: string; details?: Record<string, unknown>; mail: Mail }>;
}

/**
 * One act of a steward upon an account: confirmed by the steward's own password, in the trail, told to its owner, in
 * one transaction. Nobody does it to themselves, so a steward stays.
 * @throws AppError invalid (password, address), notFound, conflict (oneself), and what `apply` refuses
 */
export async function changePerson(
  deps: Deps,
  actor: SignedInActor,
  { find, currentPassword, reason, apply }: Change,
): Promise<void> {
  await assertPassword(deps, actor, currentPassword);
  await deps.db.transaction(async (transaction) => {
    await refuseUnlessStillSteward(actor, transaction);
    const user = await User.findOne({ where: { ...find, erasedAt: null }, transaction });
    if (!user) throw missing(find);
    if (user.id === actor.userId)
      throw new AppError('conflict', 'This is your own account. Another steward can do that.');
    const { action, details = {}, mail } = await apply(user, transaction);
    await appendTrail(
      {
        ...{ actor, at: deps.clock(), subjectType: 'account', subjectId: user.id, action, details },
        ...(reason ? { texts: { reason } } : {}),
      },
      transaction,
    );
    await queueMail(deps, { to: user.email, userId: user.id, ...mail }, transaction);
  });
}

const missing = (find: Change['find']) =>
  'email' in find
    ? new AppError('invalid', undefined, { email: 'No account goes by this address.' })
    : new AppError('notFound', 'There is no such account.');

/** Two stewards who act upon each other at once: the second has lost the right meanwhile. */
async function refuseUnlessStillSteward({ userId }: SignedInActor, transaction: Transaction): Promise<void> {
  const where = { id: userId, role: 'steward', lockedAt: null, erasedAt: null };
  if ((await User.count({ where, transaction })) === 0) throw new AppError('notAllowed');
}
