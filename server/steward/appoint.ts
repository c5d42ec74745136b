import type { z } from 'zod';

import type { appointRequestSchema } from '@/lib/contract/steward';

import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { changePerson } from './changePerson';
import { appointedMail, dismissedMail } from './mails';

/**
 * Makes a confirmed account a moderator or a steward. Errors: those of changePerson; `invalid` beside the address,
 * `conflict` for a locked account and for one that has the role.
 */
export async function appoint(
  deps: Deps,
  actor: SignedInActor,
  { email, role, currentPassword }: z.output<typeof appointRequestSchema>,
): Promise<void> {
  await changePerson(deps, actor, {
    find: { email },
    currentPassword,
    async apply(user, transaction) {
      const { role: from } = user;
      if (!user.emailVerifiedAt)
        throw new AppError('invalid', undefined, { email: 'This address has not been confirmed yet.' });
      if (user.lockedAt) throw new AppError('conflict', 'This account is locked.');
      if (from === role) throw new AppError('conflict', 'This account has that role already.');
      await user.update({ role }, { transaction });
      const { publicUrl, requiresSecondFactor } = deps.config;
      const mail = appointedMail(publicUrl, role, requiresSecondFactor);
      return { action: 'appointed', details: { role, from }, mail };
    },
  });
}

/** Takes the role of a moderator or a steward away, at once. Errors: those of changePerson; `conflict` for an owner. */
export async function dismiss(
  deps: Deps,
  actor: SignedInActor,
  userId: string,
  request: { reason: string; currentPassword: string },
): Promise<void> {
  await changePerson(deps, actor, {
    find: { id: userId },
    ...request,
    async apply(user, transaction) {
      const { role: from } = user;
      if (from === 'owner') throw new AppError('conflict', 'This account has no role to take away.');
      await user.update({ role: 'owner' }, { transaction });
      return { action: 'dismissed', details: { from }, mail: dismissedMail(from) };
    },
  });
}
