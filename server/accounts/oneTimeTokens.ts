import type { Transaction } from 'sequelize';

import { OneTimeToken, type TokenPurpose, User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { drawToken, hashToken } from './secretTokens';

const hourMs = 3_600_000;
/** How long a link in a mail is good for. */
export const tokenHours: Record<TokenPurpose, number> = { verify: 24, reset: 1 };

/** A fresh token for a mail; the account's earlier ones of this purpose are void from now on. */
export async function issueToken(
  { clock }: Deps,
  userId: string,
  purpose: TokenPurpose,
  transaction: Transaction,
): Promise<string> {
  await voidTokens(userId, purpose, transaction);
  const token = drawToken();
  const expiresAt = new Date(clock().getTime() + tokenHours[purpose] * hourMs);
  await OneTimeToken.create(
    { userId, purpose, tokenHash: hashToken(token), expiresAt, createdAt: clock() },
    { transaction },
  );
  return token;
}

/**
 * Uses a token up and returns its account.
 * @throws AppError `gone` for one that is unknown, used, void or too old
 */
export async function redeemToken(
  { clock }: Deps,
  token: string,
  purpose: TokenPurpose,
  transaction: Transaction,
): Promise<User> {
  const row = await findLiveToken(clock(), token, purpose, transaction);
  await row.update({ usedAt: clock() }, { transaction });
  return User.findByPk(row.userId, { rejectOnEmpty: true, transaction });
}

/** The account a token would let in, without using it up. Errors as redeemToken. */
export async function ownerOfToken({ clock }: Deps, token: string, purpose: TokenPurpose): Promise<User> {
  const row = await findLiveToken(clock(), token, purpose);
  return User.findByPk(row.userId, { rejectOnEmpty: true });
}

export async function voidTokens(userId: string, purpose: TokenPurpose, transaction: Transaction) {
  await OneTimeToken.destroy({ where: { userId, purpose, usedAt: null }, transaction });
}

async function findLiveToken(now: Date, token: string, purpose: TokenPurpose, transaction?: Transaction) {
  const row = await OneTimeToken.findOne({
    where: { tokenHash: hashToken(token), purpose, usedAt: null },
    transaction,
  });
  if (!row || row.expiresAt <= now) throw new AppError('gone');
  return row;
}
