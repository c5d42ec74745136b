import { appendAccountTrail } from '../accounts/accountTrail';
import { assertPassword } from '../accounts/assertPassword';
import { RecoveryCode } from '../db/models';
import type { Deps } from '../deps';
import { queueMail } from '../mail/queueMail';
import type { SignedInActor } from '../policies';
import { freshRecoveryCodesMail, secondFactorOffMail } from './mails';
import { issueRecoveryCodes } from './recoveryCodes';
import { spendCode } from './spendCode';

interface Proof {
  currentPassword: string;
  code: string;
}

/** Turns the second step of signing in off. Errors: `invalid` (password or code), as spendCode. */
export async function turnOff(
  deps: Deps,
  actor: SignedInActor,
  { currentPassword, code }: Proof,
): Promise<void> {
  const user = await assertPassword(deps, actor, currentPassword);
  await spendCode(deps, user.id, code, async (factor, transaction) => {
    await factor.destroy({ transaction });
    await RecoveryCode.destroy({ where: { userId: user.id }, transaction });
    await appendAccountTrail(deps, user, 'secondFactorOff', transaction);
    const mail = secondFactorOffMail(deps.config.publicUrl);
    await queueMail(deps, { to: user.email, userId: user.id, ...mail }, transaction);
  });
}

/** Ten fresh recovery codes; the earlier ones are void. Errors as turnOff. */
export async function renewRecoveryCodes(
  deps: Deps,
  actor: SignedInActor,
  { currentPassword, code }: Proof,
): Promise<string[]> {
  const user = await assertPassword(deps, actor, currentPassword);
  return spendCode(deps, user.id, code, async (_factor, transaction) => {
    await appendAccountTrail(deps, user, 'recoveryCodesRenewed', transaction);
    const mail = freshRecoveryCodesMail(deps.config.publicUrl);
    await queueMail(deps, { to: user.email, userId: user.id, ...mail }, transaction);
    return issueRecoveryCodes(deps, user.id, transaction);
  });
}
