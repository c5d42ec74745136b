import type { z } from 'zod';

import type { deleteAccountRequestSchema } from '@/lib/contract/accounts';

import { appendAccountTrail } from '../accounts/accountTrail';
import { assertPassword } from '../accounts/assertPassword';
import { Bank, User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { eraseRecords } from '../records/revokeRecord';
import { erasePersonalData } from './erasePersonalData';
import { withdrawChecks } from './withdrawChecks';

/**
 * Deletes an account at its owner's wish, in one transaction: the checks are withdrawn or left without a name, and
 * everything personal is erased; health records are withdrawn and emptied. Its files go right after the commit.
 * @throws AppError invalid (the password), conflict (the only steward)
 */
export async function deleteAccount(
  deps: Deps,
  actor: SignedInActor,
  { currentPassword, checks: afterwards }: z.output<typeof deleteAccountRequestSchema>,
): Promise<void> {
  const { clock, db } = deps;
  const { id: userId } = await assertPassword(deps, actor, currentPassword);
  const storageKeys = await db.transaction(async (transaction) => {
    const user = await User.findOne({ where: { id: userId, erasedAt: null }, transaction });
    if (!user) throw new AppError('notSignedIn');
    if (
      user.role === 'steward' &&
      (await User.count({ where: { role: 'steward', lockedAt: null }, transaction })) === 1
    )
      throw new AppError('conflict', 'You are the only steward. Appoint another one before you leave.');
    const banks = await Bank.findAll({ attributes: ['id'], where: { ownerId: userId }, transaction });
    const bankIds = banks.map(({ id }) => id);
    await withdrawChecks(deps, actor, { bankIds, afterwards }, transaction);
    await eraseRecords(deps, actor, bankIds, transaction);
    await appendAccountTrail(deps, user, 'deleted', transaction, { checks: afterwards });
    return erasePersonalData(user, clock(), transaction);
  });
  await removeFiles(deps, storageKeys);
}

/** A file that can't be removed now has no row any more, and is swept at the next start. */
async function removeFiles({ storage, logger }: Deps, storageKeys: readonly string[]): Promise<void> {
  for (const key of storageKeys) {
    await storage
      .remove(key)
      .catch((error: unknown) => logger.error({ err: error }, 'a file of a deleted account is still there'));
  }
}
