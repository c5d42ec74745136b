import { Op, type Transaction } from 'sequelize';

import { Session } from '../db/models';
import type { Deps } from '../deps';
import { refreshDays } from './cookies';
import { hashToken } from './secretTokens';

interface Family {
  userId: string;
  familyId: string;
}

/** Stores a refresh token of a sign-in, by its hash. */
export async function storeRefreshToken(
  { clock }: Deps,
  { userId, familyId }: Family,
  token: string,
  transaction: Transaction,
): Promise<void> {
  const expiresAt = new Date(clock().getTime() + refreshDays * 86_400_000);
  await Session.create(
    { userId, familyId, tokenHash: hashToken(token), expiresAt, createdAt: clock() },
    { transaction },
  );
}

/** Ends one sign-in, or all of an account: their refresh tokens are good for nothing any more. */
export async function endSessionsOf(
  { clock }: Deps,
  which: { userId: string } | { familyId: string },
  transaction: Transaction,
): Promise<void> {
  await Session.update({ revokedAt: clock() }, { where: { ...which, revokedAt: null }, transaction });
}

/** Ends every sign-in of an account but the one that asks. */
export async function endOtherSessions(
  { clock }: Deps,
  { userId, familyId }: Family,
  transaction: Transaction,
): Promise<void> {
  const where = { userId, familyId: { [Op.ne]: familyId }, revokedAt: null };
  await Session.update({ revokedAt: clock() }, { where, transaction });
}

/** Drops the account's tokens that have run out; each sign-in tidies up after the earlier ones. */
export async function dropExpiredSessions(
  { clock }: Deps,
  userId: string,
  transaction: Transaction,
): Promise<void> {
  await Session.destroy({ where: { userId, expiresAt: { [Op.lt]: clock() } }, transaction });
}
