import { randomUUID } from 'node:crypto';

import type { Transaction } from 'sequelize';
import type { z } from 'zod';

import type { signInRequestSchema } from '@/lib/contract/accounts';

import { User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { findConfirmedFactor } from '../secondFactor/secondFactorOf';
import { readStepToken, signStepToken } from '../secondFactor/stepToken';
import { spendCode } from '../secondFactor/spendCode';
import type { SignedInActor } from '../policies';
import { isPasswordOf } from './passwords';
import { drawToken } from './secretTokens';
import { sendVerification } from './sendVerification';
import { dropExpiredSessions, storeRefreshToken } from './sessions';

export interface SignedIn {
  actor: SignedInActor;
  refreshToken: string;
}

/** The password was right and a code is to follow. */
export interface HalfSignedIn {
  stepToken: string;
}

/**
 * Begins a sign-in, or its second step where the account asks for a code. Errors: `wrongCredentials`, alike for a wrong
 * password and no account; after a right password only `addressUnconfirmed`, with the mail sent again, and
 * `accountLocked`.
 */
export async function signIn(
  deps: Deps,
  { email, password }: z.output<typeof signInRequestSchema>,
): Promise<SignedIn | HalfSignedIn> {
  const user = await User.findOne({ where: { email } });
  const isRight = await isPasswordOf(user, password, deps.config.bcryptCost);
  if (!user || !isRight) throw new AppError('wrongCredentials');
  if (!user.emailVerifiedAt) {
    await deps.db.transaction((transaction) => sendVerification(deps, user, transaction));
    throw new AppError('addressUnconfirmed');
  }
  if (user.lockedAt) throw new AppError('accountLocked');
  if (await findConfirmedFactor(user.id)) return { stepToken: signStepToken(deps, user) };
  return deps.db.transaction((transaction) => openSession(deps, user, transaction));
}

/**
 * Ends a sign-in by a code. Errors: `gone` without a right password just before, `accountLocked`, and those of spendCode.
 */
export async function signInByCode(
  deps: Deps,
  stepToken: string | undefined,
  code: string,
): Promise<SignedIn> {
  const user = await readStepToken(deps, stepToken);
  if (!user) throw new AppError('gone', 'Too long has passed since the password. Enter it again.');
  if (user.lockedAt) throw new AppError('accountLocked');
  return spendCode(deps, user.id, code, (_factor, transaction) => openSession(deps, user, transaction));
}

async function openSession(deps: Deps, user: User, transaction: Transaction): Promise<SignedIn> {
  const actor = { role: user.role, userId: user.id, familyId: randomUUID() };
  const refreshToken = drawToken();
  await dropExpiredSessions(deps, user.id, transaction);
  await storeRefreshToken(deps, actor, refreshToken, transaction);
  return { actor, refreshToken };
}
