import { Op, type Transaction } from 'sequelize';

import { Bank, BankEvent, CellType, Check } from '../db/models';
import { AppError } from '../errors';
import { type Action, type Actor, authorizeRecord } from '../policies';

/** A bank with its cell type and events, as every reader of this folder hands it on. */
export type LoadedBank = Bank & { cellType: CellType; events: BankEvent[] };

const parts = [
  { model: CellType, as: 'cellType' },
  { model: BankEvent, as: 'events', separate: true, order: [['happenedOn', 'ASC'] as [string, string]] },
];

/**
 * The bank, if the actor may do this with it.
 * @throws AppError notFound, for others' banks too
 */
export async function findOwnBank(
  actor: Actor,
  action: Action,
  bankId: string,
  transaction?: Transaction,
): Promise<LoadedBank> {
  const bank = await Bank.findByPk(bankId, { include: parts, transaction });
  if (!bank) throw new AppError('notFound');
  authorizeRecord(actor, action, bank);
  return bank as LoadedBank;
}

/** An owner's banks, oldest first. */
export async function findBanksOf(ownerId: string, transaction?: Transaction): Promise<LoadedBank[]> {
  const banks = await Bank.findAll({
    where: { ownerId },
    include: parts,
    order: [
      ['createdAt', 'ASC'],
      ['id', 'ASC'],
    ],
    transaction,
  });
  return banks as LoadedBank[];
}

/** Checks of each bank that stand: all but withdrawn ones. */
export async function countChecks(bankIds: string[]): Promise<Map<string, number>> {
  const rows = await Check.count({
    where: { bankId: bankIds, state: { [Op.ne]: 'withdrawn' } },
    group: ['bankId'],
  });
  return new Map(rows.map(({ bankId, count }) => [String(bankId), count]));
}
