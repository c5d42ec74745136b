import { randomUUID } from 'node:crypto';

import { Op, type Transaction } from 'sequelize';

import {
  AddressChange,
  Bank,
  BankEvent,
  CellType,
  Check,
  OneTimeToken,
  OutboxMail,
  RecoveryCode,
  Reminder,
  SecondFactor,
  Session,
  TrailEntry,
  TrailText,
  Upload,
  type User,
} from '../db/models';
import { keysOf } from '../uploads/keysOf';

/** What a bank is called that nobody owns any more. */
const namelessBank = 'Bank of a deleted account';

/**
 * Erases everything personal of an account: address, password, sign-ins, mails, names, notes, words in the trail, files.
 * The row of the account stays, empty, so that its banks go on counting as one owner's.
 * @returns the storage keys of the files, to be removed after the commit
 */
export async function erasePersonalData(user: User, at: Date, transaction: Transaction): Promise<string[]> {
  const userId = user.id;
  const ofUser = { where: { userId }, transaction };
  const bankIds = (await Bank.findAll({ attributes: ['id'], where: { ownerId: userId }, transaction })).map(
    ({ id }) => id,
  );
  const ofBanks = { where: { bankId: bankIds }, transaction };

  await Session.destroy(ofUser);
  await SecondFactor.destroy(ofUser);
  await RecoveryCode.destroy(ofUser);
  await OneTimeToken.destroy(ofUser);
  await AddressChange.destroy(ofUser);
  await OutboxMail.destroy({ where: { [Op.or]: [{ userId }, { recipient: user.email }] }, transaction });
  await CellType.update({ proposedById: null }, { where: { proposedById: userId }, transaction });

  await Bank.update({ name: namelessBank }, { where: { ownerId: userId }, transaction });
  await BankEvent.update({ note: '' }, ofBanks);
  await Reminder.destroy(ofBanks);
  await Check.update({ note: '', uploadId: null, photoId: null }, ofBanks);
  await eraseTrailTexts(userId, transaction);

  const uploads = await Upload.findAll({ where: { ownerId: userId }, transaction });
  await Upload.destroy({ where: { ownerId: userId }, transaction });

  await user.update(
    {
      email: `deleted-${randomUUID()}@deleted.invalid`,
      passwordHash: '',
      role: 'owner',
      emailVerifiedAt: null,
      noticeReminders: false,
      noticeDecisions: false,
      noticeReleases: false,
      erasedAt: at,
    },
    { transaction },
  );
  return uploads.flatMap(keysOf);
}

/**
 * The person's own words, and why a steward did something to the account; what others wrote of a check, such as a
 * moderator's reason, is not theirs.
 */
async function eraseTrailTexts(userId: string, transaction: Transaction): Promise<void> {
  const entries = await TrailEntry.findAll({
    attributes: ['id'],
    where: { [Op.or]: [{ actorId: userId }, { subjectType: 'account', subjectId: userId }] },
    transaction,
  });
  await TrailText.destroy({ where: { trailId: entries.map(({ id }) => id) }, transaction });
}
