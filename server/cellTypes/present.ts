import type { CellTypeBrief, CellTypeChoice } from '@/lib/contract/banks';

import type { CellType } from '../db/models';

/** A cell type as pickers, banks and submissions carry it along. */
export function presentCellTypeBrief(cellType: CellType): CellTypeBrief {
  const { id, maker, ratedAh, nominalV } = cellType;
  return { id, maker, name: nameOf(cellType), ratedAh, nominalV };
}

/** A cell type as those see it who may choose it. */
export function presentCellTypeChoice(cellType: CellType): CellTypeChoice {
  const { faceAreaMm2, status } = cellType;
  return { ...presentCellTypeBrief(cellType), faceAreaMm2, isProposed: status === 'proposed' };
}

/** A proposal's name is the one that was typed: how it is told apart from another's says that there is one. */
const nameOf = ({ status, name, proposedName }: CellType) =>
  status === 'proposed' ? (proposedName ?? name) : name;
