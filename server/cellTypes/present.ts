import type { CellTypeBrief } from '@/lib/contract/banks';

import type { CellType } from '../db/models';

/** A cell type as pickers, banks and submissions carry it along. */
export function presentCellTypeBrief({ id, maker, name, ratedAh, nominalV }: CellType): CellTypeBrief {
  return { id, maker, name, ratedAh, nominalV };
}
