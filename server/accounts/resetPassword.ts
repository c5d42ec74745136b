import type { z } from 'zod';

import type { resetRequestSchema } from '@/lib/contract/accounts';

import type { Deps } from '../deps';
import { AddressChange } from '../db/models';
import { queueMail } from '../mail/queueMail';
import { appendAccountTrail } from './accountTrail';
import { passwordChangedMail } from './mails';
import { ownerOfToken, redeemToken, voidTokens } from './oneTimeTokens';
import { assertPasswordAllowed } from './passwordRules';
import { hashPassword } from './passwords';
import { endSessionsOf } from './sessions';

/**
 * Sets a new password by the token of a mail and ends every session of the account. The mail having arrived, the
 * address is confirmed too, and a move to another that waits is called off. A refused password leaves the token good. Errors: `gone`, `invalid`.
 */
export async function resetPassword(
  deps: Deps,
  { token, password }: z.output<typeof resetRequestSchema>,
): Promise<void> {
  const { email } = await ownerOfToken(deps, token, 'reset');
  assertPasswordAllowed(password, email);
  const passwordHash = await hashPassword(password, deps.config.bcryptCost);
  await deps.db.transaction(async (transaction) => {
    const user = await redeemToken(deps, token, 'reset', transaction);
    const emailVerifiedAt = user.emailVerifiedAt ?? deps.clock();
    await user.update({ passwordHash, emailVerifiedAt }, { transaction });
    await voidTokens(user.id, 'verify', transaction);
    await AddressChange.destroy({ where: { userId: user.id }, transaction });
    await endSessionsOf(deps, { userId: user.id }, transaction);
    await appendAccountTrail(deps, user, 'passwordReset', transaction);
    await queueMail(
      deps,
      { to: email, userId: user.id, ...passwordChangedMail(deps.config.publicUrl) },
      transaction,
    );
  });
}
