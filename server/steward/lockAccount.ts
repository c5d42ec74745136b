import { endSessionsOf } from '../accounts/sessions';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { changePerson } from './changePerson';
import { lockedMail, unlockedMail } from './mails';

interface Request {
  reason: string;
  currentPassword: string;
}

/** Keeps an account from signing in and ends its sign-ins at once. Errors: those of changePerson; `conflict`. */
export async function lockAccount(
  deps: Deps,
  actor: SignedInActor,
  userId: string,
  request: Request,
): Promise<void> {
  await changePerson(deps, actor, {
    find: { id: userId },
    ...request,
    async apply(user, transaction) {
      if (user.lockedAt) throw new AppError('conflict', 'This account is locked already.');
      await user.update({ lockedAt: deps.clock() }, { transaction });
      await endSessionsOf(deps, { userId: user.id }, transaction);
      return { action: 'locked', mail: lockedMail(request.reason) };
    },
  });
}

/** Lets a locked account sign in again. Errors: those of changePerson; `conflict`. */
export async function unlockAccount(
  deps: Deps,
  actor: SignedInActor,
  userId: string,
  request: Request,
): Promise<void> {
  await changePerson(deps, actor, {
    find: { id: userId },
    ...request,
    async apply(user, transaction) {
      if (!user.lockedAt) throw new AppError('conflict', 'This account is not locked.');
      await user.update({ lockedAt: null }, { transaction });
      return { action: 'unlocked', mail: unlockedMail(deps.config.publicUrl) };
    },
  });
}
