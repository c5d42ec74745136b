import { Op } from 'sequelize';

import { CellType, QuotedClaim } from '../db/models';

export type LoadedCellType = CellType & { claims: QuotedClaim[] };

const claims = {
  model: QuotedClaim,
  as: 'claims',
  separate: true,
  order: [['cycles', 'DESC'] as [string, string]],
};

/** Listed cell types with what their sheets claim, by maker and name. */
export async function findCellTypes(): Promise<LoadedCellType[]> {
  const cellTypes = await CellType.findAll({
    where: { status: 'listed' },
    include: [claims],
    order: [
      ['maker', 'ASC'],
      ['name', 'ASC'],
    ],
  });
  return cellTypes as LoadedCellType[];
}

/** A listed cell type; under the name of one that was merged, the one it turned out to be. */
export async function findCellType(id: string): Promise<LoadedCellType | null> {
  const named = await CellType.findByPk(id, { include: [claims] });
  if (!named) return null;
  if (named.mergedIntoId) return findCellType(named.mergedIntoId);
  return named.status === 'listed' ? (named as LoadedCellType) : null;
}

const mostRelated = 4;

/** Other listed cell types of the same form, nearest in capacity first. */
export async function findRelated({ id, format, ratedAh }: CellType): Promise<CellType[]> {
  const others = await CellType.findAll({ where: { status: 'listed', format, id: { [Op.ne]: id } } });
  const distance = (other: CellType) => Math.abs(Math.log(other.ratedAh / ratedAh));
  return others.sort((a, b) => distance(a) - distance(b) || (a.id < b.id ? -1 : 1)).slice(0, mostRelated);
}
