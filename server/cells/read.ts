import type { CellList, CellPage } from '@/lib/contract/cells';

import type { Deps } from '../deps';
import { AppError } from '../errors';
import { findCurrentFit } from '../fits/currentFit';
import { findWaiting } from '../pool/waiting';
import { type AddressedBand, addressedBands } from './bands';
import { presentCell, presentCells } from './present';
import { findCellType, findCellTypes, findRelated } from './queries';

/** Every listed cell type at the standard use, by the public fit. */
export async function readCells(deps: Deps): Promise<CellList> {
  const [cellTypes, fit, waiting] = await Promise.all([
    findCellTypes(),
    findCurrentFit(deps, 'public'),
    findWaiting(deps),
  ]);
  return presentCells(cellTypes, { fit, waiting });
}

/**
 * One cell type, whole or in one band; an old address leads to the cell type it was merged into.
 * @throws AppError notFound, invalid
 */
export async function readCellPage(deps: Deps, cellId: string, bandKey?: string): Promise<CellPage> {
  const band = bandKey === undefined ? null : bandOf(bandKey);
  const cellType = await findCellType(cellId);
  if (!cellType) throw new AppError('notFound', 'There is no cell type under this name.');
  const [fit, waiting, related] = await Promise.all([
    findCurrentFit(deps, 'public'),
    findWaiting(deps, cellType.id),
    findRelated(cellType),
  ]);
  const movedFrom = cellType.id === cellId ? null : cellId;
  return { ...presentCell(cellType, related, band, { fit, waiting }), movedFrom };
}

function bandOf(key: string): AddressedBand {
  const band = addressedBands.find((addressed) => addressed.key === key);
  if (band) return band;
  const offered = addressedBands.map((addressed) => addressed.key).join(', ');
  throw new AppError('invalid', undefined, { band: `There is no such band. Choose one of ${offered}.` });
}
