import { cellListSchema, cellPageSchema, cellParamsSchema, cellQuerySchema } from '@/lib/contract/cells';

import { route, type Route } from '../http/route';
import { readCellPage, readCells } from './read';

export const cellRoutes: Route[] = [
  route({
    method: 'get',
    path: '/cells',
    policy: 'cells.read',
    response: cellListSchema,
    isKept: true,
    handle: ({ deps }) => readCells(deps),
  }),
  route({
    method: 'get',
    path: '/cells/:cellId',
    policy: 'cells.read',
    params: cellParamsSchema,
    query: cellQuerySchema,
    response: cellPageSchema,
    isKept: true,
    handle: ({ deps, params, query }) => readCellPage(deps, params.cellId, query.band),
  }),
];
