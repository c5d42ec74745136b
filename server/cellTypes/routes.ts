import { cellTypeListSchema } from '@/lib/contract/banks';

import { route, type Route } from '../http/route';
import { presentCellTypeBrief } from './present';
import { findListedCellTypes } from './queries';

export const cellTypeRoutes: Route[] = [
  route({
    method: 'get',
    path: '/cell-types',
    policy: 'cellTypes.read',
    response: cellTypeListSchema,
    handle: async () => ({ cellTypes: (await findListedCellTypes()).map(presentCellTypeBrief) }),
  }),
];
