import type { SecondFactorOffer } from '@/lib/contract/secondFactor';

import { appendAccountTrail } from '../accounts/accountTrail';
import { assertPassword } from '../accounts/assertPassword';
import { endOtherSessions } from '../accounts/sessions';
import { SecondFactor, User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { queueMail } from '../mail/queueMail';
import type { SignedInActor } from '../policies';
import { secondFactorOnMail } from './mails';
import { qrPath } from './qrPath';
import { issueRecoveryCodes } from './recoveryCodes';
import { sealSecret } from './sealSecret';
import { drawSecret, secretLink } from './totp';
import { spendCode } from './spendCode';

/**
 * Draws a secret for an authenticator app. Nothing is asked by it until a code of the app has confirmed that it is
 * there; until then the set-up can begin anew.
 * @throws AppError invalid (the password), conflict (it is on)
 */
export async function beginSetUp(
  deps: Deps,
  actor: SignedInActor,
  currentPassword: string,
): Promise<SecondFactorOffer> {
  const { id: userId, email } = await assertPassword(deps, actor, currentPassword);
  const secret = drawSecret();
  await deps.db.transaction(async (transaction) => {
    const known = await SecondFactor.findByPk(userId, { transaction });
    if (known?.confirmedAt)
      throw new AppError('conflict', 'Signing in asks for a code already. Turn that off first.');
    const sealedSecret = sealSecret(secret, userId, deps.config.secret);
    // What was counted against guesses stays.
    if (known) await known.update({ sealedSecret, lastStep: null }, { transaction });
    else await SecondFactor.create({ userId, sealedSecret, createdAt: deps.clock() }, { transaction });
  });
  const uri = secretLink(secret, email);
  return { secret, uri, qr: qrPath(uri) };
}

/**
 * Turns it on by a first code, which shows that the app has the secret. Ends every other sign-in, which was made without.
 * @returns the recovery codes, which nobody can read again
 * @throws AppError as spendCode
 */
export async function confirmSetUp(deps: Deps, actor: SignedInActor, code: string): Promise<string[]> {
  return spendCode(
    deps,
    actor.userId,
    code,
    async (factor, transaction) => {
      await factor.update({ confirmedAt: deps.clock() }, { transaction });
      const user = await User.findByPk(actor.userId, { rejectOnEmpty: true, transaction });
      await endOtherSessions(deps, actor, transaction);
      await appendAccountTrail(deps, user, 'secondFactorOn', transaction);
      const mail = secondFactorOnMail(deps.config.publicUrl);
      await queueMail(deps, { to: user.email, userId: user.id, ...mail }, transaction);
      return issueRecoveryCodes(deps, user.id, transaction);
    },
    true,
  );
}
