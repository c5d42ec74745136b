import { User } from '../db/models';
import type { Deps } from '../deps';
import { queueMail } from '../mail/queueMail';
import { resetMail } from './mails';
import { issueToken } from './oneTimeTokens';

/** Mails a link to choose a new password; does nothing for an address without an account. */
export async function requestReset(deps: Deps, email: string): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const user = await User.findOne({ where: { email }, transaction });
    if (!user) return;
    const token = await issueToken(deps, user.id, 'reset', transaction);
    await queueMail(
      deps,
      { to: email, userId: user.id, ...resetMail(deps.config.publicUrl, token) },
      transaction,
    );
  });
}
