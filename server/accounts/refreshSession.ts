import type { Transaction } from 'sequelize';

import { Session, User } from '../db/models';
import type { Deps } from '../deps';
import { appendAccountTrail } from './accountTrail';
import { hashToken, successorOf } from './secretTokens';
import { endSessionsOf, storeRefreshToken } from './sessions';
import type { SignedIn } from './signIn';

/**
 * How long a used token may come again and get the same successor: another tab asked at the same moment, or the answer
 * was lost on the way.
 */
export const graceMs = 60_000;

/**
 * Exchanges a refresh token for its successor; undefined when the sign-in has ended. A used token that comes again ends
 * the whole sign-in, as one of the two holders must have stolen it. Within the grace, and only while the successor is
 * unused, it gets that same successor again: the chain never forks, so a thief and the owner still meet at the next
 * exchange.
 */
export async function refreshSession(deps: Deps, token: string | undefined): Promise<SignedIn | undefined> {
  if (token === undefined) return undefined;
  return deps.db.transaction((transaction) => exchange(deps, token, transaction));
}

async function exchange(deps: Deps, token: string, transaction: Transaction): Promise<SignedIn | undefined> {
  const now = deps.clock();
  const session = await Session.findOne({ where: { tokenHash: hashToken(token) }, transaction });
  if (!session || session.revokedAt || session.expiresAt <= now) return undefined;
  const user = await User.findByPk(session.userId, { rejectOnEmpty: true, transaction });
  if (user.lockedAt) return undefined;
  const refreshToken = successorOf(token, deps.config.secret);

  if (!session.usedAt) {
    await session.update({ usedAt: now }, { transaction });
    await storeRefreshToken(deps, session, refreshToken, transaction);
  } else if (!(await isWithinGrace(session.usedAt, now, refreshToken, transaction))) {
    await endSessionsOf(deps, { familyId: session.familyId }, transaction);
    await appendAccountTrail(deps, user, 'sessionReused', transaction);
    return undefined;
  }
  return { actor: { role: user.role, userId: user.id, familyId: session.familyId }, refreshToken };
}

async function isWithinGrace(usedAt: Date, now: Date, refreshToken: string, transaction: Transaction) {
  if (now.getTime() - usedAt.getTime() > graceMs) return false;
  const successor = await Session.findOne({ where: { tokenHash: hashToken(refreshToken) }, transaction });
  return successor !== null && successor.usedAt === null;
}
