import type { z } from 'zod';

import type { changePasswordRequestSchema } from '@/lib/contract/accounts';

import { AddressChange } from '../db/models';
import type { Deps } from '../deps';
import { queueMail } from '../mail/queueMail';
import type { SignedInActor } from '../policies';
import { appendAccountTrail } from './accountTrail';
import { assertPassword } from './assertPassword';
import { passwordChangedMail } from './mails';
import { voidTokens } from './oneTimeTokens';
import { assertPasswordAllowed } from './passwordRules';
import { hashPassword } from './passwords';
import { endOtherSessions } from './sessions';

/**
 * Sets a new password, ends every other sign-in and voids links that wait in mails. Errors: `invalid`, beside the
 * present password or the new one.
 */
export async function changePassword(
  deps: Deps,
  actor: SignedInActor,
  { currentPassword, password }: z.output<typeof changePasswordRequestSchema>,
): Promise<void> {
  const { config, db } = deps;
  const user = await assertPassword(deps, actor, currentPassword);
  assertPasswordAllowed(password, user.email);
  const passwordHash = await hashPassword(password, config.bcryptCost);
  await db.transaction(async (transaction) => {
    await user.update({ passwordHash }, { transaction });
    await voidTokens(user.id, 'reset', transaction);
    await AddressChange.destroy({ where: { userId: user.id }, transaction });
    await endOtherSessions(deps, actor, transaction);
    await appendAccountTrail(deps, user, 'passwordChanged', transaction);
    const mail = passwordChangedMail(config.publicUrl, 'others');
    await queueMail(deps, { to: user.email, userId: user.id, ...mail }, transaction);
  });
}
