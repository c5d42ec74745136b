import type { z } from 'zod';

import type { changeEmailRequestSchema } from '@/lib/contract/accounts';

import { AddressChange, User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { queueMail } from '../mail/queueMail';
import type { SignedInActor } from '../policies';
import { addressChangeHours } from './addressChange';
import { assertPassword } from './assertPassword';
import { addressChangeAskedMail, alreadyRegisteredMail, confirmAddressMail } from './mails';
import { drawToken, hashToken } from './secretTokens';

const hourMs = 3_600_000;

/**
 * Mails a link to the new address; the account keeps its present one until the link is opened, and is told there. An
 * address that has an account gets a mail that says so, and the answer is the same. Errors: `invalid`.
 */
export async function changeEmail(
  deps: Deps,
  actor: SignedInActor,
  { email, currentPassword }: z.output<typeof changeEmailRequestSchema>,
): Promise<void> {
  const { clock, config, db } = deps;
  const user = await assertPassword(deps, actor, currentPassword);
  if (email === user.email)
    throw new AppError('invalid', undefined, { email: 'This is the address your account has.' });
  await db.transaction(async (transaction) => {
    await AddressChange.destroy({ where: { userId: user.id }, transaction });
    const asked = addressChangeAskedMail(config.publicUrl);
    await queueMail(deps, { to: user.email, userId: user.id, ...asked }, transaction);
    const holder = await User.findOne({ where: { email }, transaction });
    if (holder?.emailVerifiedAt) {
      const mail = alreadyRegisteredMail(config.publicUrl);
      return queueMail(deps, { to: email, userId: holder.id, ...mail }, transaction);
    }
    const token = drawToken();
    const expiresAt = new Date(clock().getTime() + addressChangeHours * hourMs);
    await AddressChange.create(
      { userId: user.id, email, tokenHash: hashToken(token), expiresAt, createdAt: clock() },
      { transaction },
    );
    const mail = confirmAddressMail(config.publicUrl, token);
    await queueMail(deps, { to: email, userId: user.id, ...mail }, transaction);
  });
}
