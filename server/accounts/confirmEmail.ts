import { Op } from 'sequelize';

import { AddressChange, OutboxMail, User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { queueMail } from '../mail/queueMail';
import { appendAccountTrail } from './accountTrail';
import { addressChangedMail } from './mails';
import { voidTokens } from './oneTimeTokens';
import { hashToken } from './secretTokens';

/**
 * Moves an account to the address its token was mailed to, and tells the old one. Somebody who opened an account with
 * the address and never confirmed it gives way, as nothing shows that it was theirs.
 * @throws AppError gone for a token that is unknown, used, void or too old; conflict when the address has been taken since
 */
export async function confirmEmail(deps: Deps, token: string): Promise<void> {
  const { clock, db } = deps;
  await db.transaction(async (transaction) => {
    const change = await AddressChange.findOne({ where: { tokenHash: hashToken(token) }, transaction });
    if (!change || change.expiresAt <= clock()) throw new AppError('gone');
    const { email, userId } = change;
    const holder = await User.findOne({ where: { email, id: { [Op.ne]: userId } }, transaction });
    if (holder?.emailVerifiedAt)
      throw new AppError(
        'conflict',
        'This address has an account of its own by now, so yours keeps its address.',
      );
    if (holder) {
      await OutboxMail.destroy({ where: { userId: holder.id }, transaction });
      await holder.destroy({ transaction });
    }
    const user = await User.findByPk(userId, { rejectOnEmpty: true, transaction });
    const before = user.email;
    await user.update({ email }, { transaction });
    await AddressChange.destroy({ where: { userId }, transaction });
    await voidTokens(userId, 'reset', transaction);
    await appendAccountTrail(deps, user, 'emailChanged', transaction);
    await queueMail(deps, { to: before, userId, ...addressChangedMail() }, transaction);
  });
}
