import type { Transaction } from 'sequelize';

import { SecondFactor, User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { queueMail } from '../mail/queueMail';
import { codesRefusedMail, recoveryCodeUsedMail } from './mails';
import { plainCode, spendRecoveryCode } from './recoveryCodes';
import { openSecret } from './sealSecret';
import { stepOfCode } from './totp';

/** Of a million codes three are good at a time: five tries each quarter of an hour leave a guess no chance. */
const mostFailures = 5;
export const closedMinutes = 15;

type Outcome = 'right' | 'wrong' | 'closed';

/** One answer to every code that is not good, so that it does not tell why. */
const refusals: Record<Exclude<Outcome, 'right'>, () => AppError> = {
  wrong: () =>
    new AppError('invalid', undefined, {
      code: 'This code is not right, or it has been used. Wait for the next one and try again.',
    }),
  closed: () =>
    new AppError('tooManyRequests', `Too many wrong codes. Try again in ${closedMinutes} minutes.`),
};

/**
 * Uses up a code of the account: one of its app, each once, or a recovery code. `then` is done in the same transaction
 * when it is right. Wrong ones are counted whoever enters them; after five the account takes none for a while, and its
 * owner is told.
 * @param isConfirming the code is the first, which confirms the set-up; recovery codes do not
 * @throws AppError invalid (the code), tooManyRequests, conflict (nothing set up)
 */
export async function spendCode<T>(
  deps: Deps,
  userId: string,
  typed: string,
  then: (factor: SecondFactor, transaction: Transaction) => Promise<T>,
  isConfirming = false,
): Promise<T> {
  // A refusal must leave its count behind, so it is thrown after the commit.
  const done = await deps.db.transaction(async (transaction) => {
    const factor = await SecondFactor.findByPk(userId, { transaction });
    if (!factor || (factor.confirmedAt === null) !== isConfirming)
      throw new AppError('conflict', 'The codes are not set up. Begin with the set-up.');
    const outcome = await judge(deps, factor, plainCode(typed), transaction);
    if (outcome !== 'right') return { outcome };
    await factor.update({ failures: 0, closedUntil: null }, { transaction });
    return { outcome, result: await then(factor, transaction) };
  });
  if (done.outcome !== 'right') throw refusals[done.outcome]();
  return done.result as T;
}

async function judge(
  deps: Deps,
  factor: SecondFactor,
  code: string,
  transaction: Transaction,
): Promise<Outcome> {
  const now = deps.clock();
  const { userId, closedUntil, lastStep } = factor;
  if (closedUntil && closedUntil > now) return 'closed';
  const secret = openSecret(factor.sealedSecret, userId, deps.config.secret);
  const step = await stepOfCode(secret, code, now, lastStep);
  if (step !== null) {
    await factor.update({ lastStep: step }, { transaction });
    return 'right';
  }
  if (factor.confirmedAt && (await spendRecoveryCode(deps, userId, code, transaction))) {
    await tell(deps, userId, recoveryCodeUsedMail(deps.config.publicUrl), transaction);
    return 'right';
  }
  return countFailure(deps, factor, transaction);
}

async function countFailure(deps: Deps, factor: SecondFactor, transaction: Transaction): Promise<Outcome> {
  const failures = factor.failures + 1;
  if (failures < mostFailures) {
    await factor.update({ failures }, { transaction });
    return 'wrong';
  }
  const closedUntil = new Date(deps.clock().getTime() + closedMinutes * 60_000);
  await factor.update({ failures: 0, closedUntil }, { transaction });
  await tell(deps, factor.userId, codesRefusedMail(deps.config.publicUrl), transaction);
  return 'wrong';
}

async function tell(
  deps: Deps,
  userId: string,
  mail: { subject: string; text: string },
  transaction: Transaction,
): Promise<void> {
  const { email } = await User.findByPk(userId, { rejectOnEmpty: true, transaction });
  await queueMail(deps, { to: email, userId, ...mail }, transaction);
}
