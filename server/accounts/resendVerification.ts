import { User } from '../db/models';
import type { Deps } from '../deps';
import { sendVerification } from './sendVerification';

/** Mails the link that confirms an address again; does nothing for an address that waits for none. */
export async function resendVerification(deps: Deps, email: string): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const user = await User.findOne({ where: { email, emailVerifiedAt: null }, transaction });
    if (user) await sendVerification(deps, user, transaction);
  });
}
