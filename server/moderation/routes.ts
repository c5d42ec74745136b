import { z } from 'zod';

import { idSchema } from '@/lib/contract/fields';
import {
  decisionRequestSchema,
  decisionResultSchema,
  queueQuerySchema,
  queueSchema,
  submissionSchema,
} from '@/lib/contract/moderation';

import { AppError } from '../errors';
import { findCurrentFit } from '../fits/currentFit';
import { route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { readCursor } from './cursor';
import { decide } from './decide';
import { presentQueue, presentSubmission } from './present';
import { countByState, findHistory, findQueue, findSubmission, findTrail } from './queries';

const checkParams = z.object({ checkId: idSchema });

export const moderationRoutes: Route[] = [
  route({
    method: 'get',
    path: '/screening',
    policy: 'screening.read',
    query: queueQuerySchema,
    response: queueSchema,
    async handle({ query: { state, after, limit } }) {
      const page = { state, after: after === undefined ? null : readCursor(after), limit };
      const [checks, counts] = await Promise.all([findQueue(page), countByState()]);
      return presentQueue(checks, limit, counts);
    },
  }),
  route({
    method: 'get',
    path: '/screening/:checkId',
    policy: 'screening.read',
    params: checkParams,
    response: submissionSchema,
    async handle({ deps, actor, params: { checkId } }) {
      const check = await findSubmission(checkId);
      if (!check) throw new AppError('notFound');
      const [history, trail, working] = await Promise.all([
        findHistory(check.bankId),
        findTrail(checkId),
        findCurrentFit(deps, 'working'),
      ]);
      return presentSubmission(signedInActor(actor), check, { history, trail, working });
    },
  }),
  route({
    method: 'post',
    path: '/screening/:checkId/decision',
    policy: 'screening.decide',
    params: checkParams,
    body: decisionRequestSchema,
    response: decisionResultSchema,
    handle: ({ deps, actor, params, body }) => decide(deps, signedInActor(actor), params.checkId, body),
  }),
];
