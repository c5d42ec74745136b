import { endSessionsOf } from '../accounts/sessions';
import { RecoveryCode, SecondFactor } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { isSecondFactorDue } from '../secondFactor/secondFactorOf';
import { changePerson } from './changePerson';
import { secondFactorClearedMail } from './mails';

/**
 * Takes the second step of signing in from an account whose owner has lost app and recovery codes, and ends its
 * sign-ins. Where the role asks for one, nothing can be done until it is set up anew. Errors: those of changePerson;
 * `conflict` where none is set up.
 */
export async function clearSecondFactor(
  deps: Deps,
  actor: SignedInActor,
  userId: string,
  request: { reason: string; currentPassword: string },
): Promise<void> {
  await changePerson(deps, actor, {
    find: { id: userId },
    ...request,
    async apply(user, transaction) {
      const factor = await SecondFactor.findByPk(user.id, { transaction });
      if (!factor?.confirmedAt) throw new AppError('conflict', 'This account has no second factor to clear.');
      await factor.destroy({ transaction });
      await RecoveryCode.destroy({ where: { userId: user.id }, transaction });
      await endSessionsOf(deps, { userId: user.id }, transaction);
      const { config } = deps;
      const isCodeNeeded = isSecondFactorDue(config, user.role, false);
      return {
        action: 'secondFactorCleared',
        mail: secondFactorClearedMail(config.publicUrl, request.reason, isCodeNeeded),
      };
    },
  });
}
