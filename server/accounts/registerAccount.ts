import type { z } from 'zod';

import type { registerRequestSchema } from '@/lib/contract/accounts';

import { User } from '../db/models';
import type { Deps } from '../deps';
import { queueMail } from '../mail/queueMail';
import { appendAccountTrail } from './accountTrail';
import { alreadyRegisteredMail } from './mails';
import { assertPasswordAllowed } from './passwordRules';
import { hashPassword } from './passwords';
import { sendVerification } from './sendVerification';

type RegisterInput = z.output<typeof registerRequestSchema>;

/**
 * Opens an account and mails the link that confirms its address. An address that has a confirmed account gets a mail
 * that says so. One that was never confirmed is taken over by whoever registers last: the earlier password and link
 * are void, so that nobody can lie in wait on another's address.
 */
export async function registerAccount(deps: Deps, { email, password }: RegisterInput): Promise<void> {
  assertPasswordAllowed(password, email);
  const passwordHash = await hashPassword(password, deps.config.bcryptCost);
  await deps.db.transaction(async (transaction) => {
    const existing = await User.findOne({ where: { email }, transaction });
    if (existing?.emailVerifiedAt) {
      await queueMail(
        deps,
        { to: email, userId: existing.id, ...alreadyRegisteredMail(deps.config.publicUrl) },
        transaction,
      );
      return;
    }
    const user = existing
      ? await existing.update({ passwordHash }, { transaction })
      : await User.create({ email, passwordHash, role: 'owner' }, { transaction });
    await appendAccountTrail(deps, user, existing ? 'registeredAgain' : 'registered', transaction);
    await sendVerification(deps, user, transaction);
  });
}
