import { Op, type Transaction } from 'sequelize';

import { CellType } from '../db/models';

const listedOrOwn = (userId: string | null) => ({
  [Op.or]: [
    { status: 'listed' },
    ...(userId === null ? [] : [{ status: 'proposed', proposedById: userId, closedAs: null }]),
  ],
});

/** The cell types somebody can choose from, by maker and name: listed ones, and their own open proposals. */
export async function findChoosableCellTypes(
  userId: string | null,
  transaction?: Transaction,
): Promise<CellType[]> {
  return CellType.findAll({
    where: listedOrOwn(userId),
    order: [
      ['maker', 'ASC'],
      ['name', 'ASC'],
    ],
    transaction,
  });
}

/** A cell type that may be chosen, or null. */
export async function findChoosableCellType(
  id: string,
  userId: string,
  transaction?: Transaction,
): Promise<CellType | null> {
  return CellType.findOne({ where: { id, ...listedOrOwn(userId) }, transaction });
}

/** The cell types somebody proposed, listed since or not, oldest first. */
export async function findProposalsOf(userId: string): Promise<CellType[]> {
  return CellType.findAll({ where: { proposedById: userId }, order: [['createdAt', 'ASC']] });
}
