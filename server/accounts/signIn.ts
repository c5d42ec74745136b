import { randomUUID } from 'node:crypto';

import type { z } from 'zod';

import type { signInRequestSchema } from '@/lib/contract/accounts';

import { User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { isPasswordOf } from './passwords';
import { drawToken } from './secretTokens';
import { sendVerification } from './sendVerification';
import { dropExpiredSessions, storeRefreshToken } from './sessions';

export interface SignedIn {
  actor: SignedInActor;
  refreshToken: string;
}

/**
 * Begins a sign-in. Errors: `wrongCredentials`, alike for a wrong password and no account; `addressUnconfirmed` after a
 * right password only, with the mail sent again.
 */
export async function signIn(
  deps: Deps,
  { email, password }: z.output<typeof signInRequestSchema>,
): Promise<SignedIn> {
  const user = await User.findOne({ where: { email } });
  const isRight = await isPasswordOf(user, password, deps.config.bcryptCost);
  if (!user || !isRight) throw new AppError('wrongCredentials');
  if (!user.emailVerifiedAt) {
    await deps.db.transaction((transaction) => sendVerification(deps, user, transaction));
    throw new AppError('addressUnconfirmed');
  }
  const actor = { role: user.role, userId: user.id, familyId: randomUUID() };
  const refreshToken = drawToken();
  await deps.db.transaction(async (transaction) => {
    await dropExpiredSessions(deps, user.id, transaction);
    await storeRefreshToken(deps, actor, refreshToken, transaction);
  });
  return { actor, refreshToken };
}
