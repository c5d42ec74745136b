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

export async function findCellType(id: string): Promise<LoadedCellType | null> {
  return (await CellType.findOne({
    where: { id, status: 'listed' },
    include: [claims],
  })) as LoadedCellType | null;
}
