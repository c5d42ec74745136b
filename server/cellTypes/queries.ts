import type { Transaction } from 'sequelize';

import { CellType } from '../db/models';

/** The cell types an owner can choose from, by maker and name. */
export async function findListedCellTypes(): Promise<CellType[]> {
  return CellType.findAll({
    where: { status: 'listed' },
    order: [
      ['maker', 'ASC'],
      ['name', 'ASC'],
    ],
  });
}

/** A cell type that may be chosen, or null. */
export async function findListedCellType(id: string, transaction: Transaction): Promise<CellType | null> {
  return CellType.findOne({ where: { id, status: 'listed' }, transaction });
}
