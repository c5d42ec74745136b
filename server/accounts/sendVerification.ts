import type { Transaction } from 'sequelize';

import type { User } from '../db/models';
import type { Deps } from '../deps';
import { queueMail } from '../mail/queueMail';
import { verifyMail } from './mails';
import { issueToken } from './oneTimeTokens';

/** Mails a fresh link to confirm the account's address; earlier links are void. */
export async function sendVerification(deps: Deps, user: User, transaction: Transaction): Promise<void> {
  const token = await issueToken(deps, user.id, 'verify', transaction);
  await queueMail(
    deps,
    { to: user.email, userId: user.id, ...verifyMail(deps.config.publicUrl, token) },
    transaction,
  );
}
