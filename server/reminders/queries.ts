import { fn, col, type Transaction } from 'sequelize';

import { endingOf } from '@/lib/contract/banks';

import { standingStates } from '../checks/queries';
import { Bank, BankEvent, Check, Reminder, User } from '../db/models';

/** A bank with what its reminder hangs on. */
export interface RemindedBank {
  bank: Bank;
  owner: User;
  chosen: Reminder | null;
  lastTestedOn: string | null;
  isEnded: boolean;
}

/** The last standing check of each of some banks, or of all. */
export async function findLastTestedOn(
  bankIds: string[] | 'all',
  transaction: Transaction,
): Promise<Map<string, string>> {
  const rows = (await Check.findAll({
    attributes: ['bankId', [fn('MAX', col('testedOn')), 'testedOn']],
    where: { state: standingStates, ...(bankIds === 'all' ? {} : { bankId: bankIds }) },
    group: ['bankId'],
    raw: true,
    transaction,
  })) as Pick<Check, 'bankId' | 'testedOn'>[];
  return new Map(rows.map(({ bankId, testedOn }) => [bankId, testedOn]));
}

/** The bank's reminder as it stands; null where the bank is not there. */
export async function findReminded(bankId: string, transaction: Transaction): Promise<RemindedBank | null> {
  const bank = await Bank.findByPk(bankId, {
    include: [
      { model: BankEvent, as: 'events' },
      { model: Reminder, as: 'reminder' },
    ],
    transaction,
  });
  if (!bank) return null;
  const lastTestedOn = (await findLastTestedOn([bankId], transaction)).get(bankId) ?? null;
  return {
    bank,
    owner: await User.findByPk(bank.ownerId, { rejectOnEmpty: true, transaction }),
    chosen: bank.reminder ?? null,
    lastTestedOn,
    isEnded: endingOf(bank.events ?? []) !== undefined,
  };
}
