import { cellListSchema, cellPageSchema, cellParamsSchema, cellQuerySchema } from '@/lib/contract/cells';

import { AppError } from '../errors';
import { findCurrentFit } from '../fits/currentFit';
import { route, type Route } from '../http/route';
import { findWaiting } from '../pool/waiting';
import { type AddressedBand, addressedBands } from './bands';
import { presentCell, presentCells } from './present';
import { findCellType, findCellTypes, findRelated } from './queries';

export const cellRoutes: Route[] = [
  route({
    method: 'get',
    path: '/cells',
    policy: 'cells.read',
    response: cellListSchema,
    async handle({ deps }) {
      const [cellTypes, fit, waiting] = await Promise.all([
        findCellTypes(),
        findCurrentFit(deps, 'public'),
        findWaiting(deps),
      ]);
      return presentCells(cellTypes, { fit, waiting });
    },
  }),
  route({
    method: 'get',
    path: '/cells/:cellId',
    policy: 'cells.read',
    params: cellParamsSchema,
    query: cellQuerySchema,
    response: cellPageSchema,
    async handle({ deps, params: { cellId }, query }) {
      const band = query.band === undefined ? null : bandOf(query.band);
      const cellType = await findCellType(cellId);
      if (!cellType) throw new AppError('notFound', 'There is no cell type under this name.');
      const [fit, waiting, related] = await Promise.all([
        findCurrentFit(deps, 'public'),
        findWaiting(deps, cellType.id),
        findRelated(cellType),
      ]);
      const movedFrom = cellType.id === cellId ? null : cellId;
      return { ...presentCell(cellType, related, band, { fit, waiting }), movedFrom };
    },
  }),
];

function bandOf(key: string): AddressedBand {
  const band = addressedBands.find((addressed) => addressed.key === key);
  if (band) return band;
  const offered = addressedBands.map((addressed) => addressed.key).join(', ');
  throw new AppError('invalid', undefined, { band: `There is no such band. Choose one of ${offered}.` });
}
