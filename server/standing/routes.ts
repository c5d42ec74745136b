import { z } from 'zod';

import { idSchema } from '@/lib/contract/fields';
import { standingSchema, whatIfAnswerSchema, whatIfQuerySchema } from '@/lib/contract/standing';

import { findOwnBank } from '../banks/queries';
import { route, type Route } from '../http/route';
import { findStanding } from './findStanding';
import { findWhatIf } from './findWhatIf';

const bankParams = z.object({ bankId: idSchema });

export const standingRoutes: Route[] = [
  route({
    method: 'get',
    path: '/banks/:bankId/standing',
    policy: 'standing.read',
    params: bankParams,
    response: standingSchema,
    handle: async ({ deps, actor, params }) =>
      findStanding(deps, await findOwnBank(actor, 'standing.read', params.bankId)),
  }),
  route({
    method: 'get',
    path: '/banks/:bankId/what-if',
    policy: 'standing.read',
    params: bankParams,
    query: whatIfQuerySchema,
    response: whatIfAnswerSchema,
    handle: async ({ deps, actor, params, query }) =>
      findWhatIf(deps, await findOwnBank(actor, 'standing.read', params.bankId), query),
  }),
];
