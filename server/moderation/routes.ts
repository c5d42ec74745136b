import { z } from 'zod';

import { checkSchema, objectionRequestSchema } from '@/lib/contract/checks';
import { idSchema } from '@/lib/contract/fields';
import {
  bulkApprovalRequestSchema,
  bulkApprovalSchema,
  claimResultSchema,
  decisionRequestSchema,
  decisionResultSchema,
  queueQuerySchema,
  queueSchema,
  submissionEffectSchema,
  submissionSchema,
  undoRequestSchema,
  undoResultSchema,
} from '@/lib/contract/moderation';
import { recallAtOnceRequestSchema, recallAtOnceSchema } from '@/lib/contract/steward';

import { findHidden, refuseIfHidden } from '../agreement/hidden';
import { presentCheck } from '../checks/present';
import { findOwnCheck } from '../checks/queries';
import { Proposal, severityOrder } from '../db/models';
import { AppError } from '../errors';
import { findCurrentFit } from '../fits/currentFit';
import { route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { approveClean } from './approveClean';
import { claimCheck, findClaims, releaseCheck } from './claims';
import { readCursor } from './cursor';
import { decide } from './decide';
import { findEffect } from './findEffect';
import { objectToCorrection } from './objectToCorrection';
import { presentQueue, presentSubmission } from './present';
import {
  countByState,
  findFacets,
  findHistory,
  findProposed,
  findQueue,
  findSubmission,
  findTrail,
  findUndoable,
} from './queries';
import { recallAtOnce } from './recallAtOnce';
import { undoDecisions } from './undoDecisions';
import { findWorkingPool } from './workingPool';

const checkParams = z.object({ checkId: idSchema });

export const moderationRoutes: Route[] = [
  route({
    method: 'get',
    path: '/screening',
    policy: 'screening.read',
    query: queueQuerySchema,
    response: queueSchema,
    async handle({ deps, actor, query }) {
      const { after, limit, severity, ...filters } = query;
      const isFirst = after === undefined;
      const reader = signedInActor(actor);
      const hidden = await findHidden(reader);
      const [checks, counts, facets] = await Promise.all([
        findQueue(deps.db, {
          ...filters,
          severity: severity && severityOrder.indexOf(severity),
          after: isFirst ? null : readCursor(after),
          limit,
          hidden,
        }),
        countByState(),
        isFirst ? findFacets(deps, filters.state) : null,
      ]);
      const ids = checks.map(({ id }) => id);
      const [claims, proposed] = await Promise.all([findClaims(deps, reader, ids), findProposed(ids)]);
      return presentQueue(reader, checks, { limit, counts, claims, proposed, facets });
    },
  }),
  route({
    method: 'post',
    path: '/screening/approve-clean',
    policy: 'screening.decide',
    body: bulkApprovalRequestSchema,
    response: bulkApprovalSchema,
    handle: ({ deps, actor, body }) => approveClean(deps, signedInActor(actor), body),
  }),
  route({
    method: 'post',
    path: '/screening/undo',
    policy: 'screening.decide',
    body: undoRequestSchema,
    response: undoResultSchema,
    handle: async ({ deps, actor, body }) => ({
      results: await undoDecisions(deps, signedInActor(actor), body.decisionIds),
    }),
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
      const reader = signedInActor(actor);
      await refuseIfHidden(reader, checkId);
      const hidden = await findHidden(reader);
      const [history, trail, working, claims, pool, proposal, undoable] = await Promise.all([
        findHistory(check.bankId),
        findTrail(checkId),
        findCurrentFit(deps, 'working'),
        findClaims(deps, reader, [checkId]),
        findWorkingPool(deps),
        Proposal.findByPk(checkId),
        findUndoable(checkId, reader.userId, deps.clock()),
      ]);
      for (const one of history) if (hidden.has(one.id)) one.state = 'submitted';
      const claim = claims.get(checkId) ?? null;
      const influence = pool?.influence.get(check.bankId) ?? null;
      return presentSubmission(reader, check, {
        history,
        trail,
        working,
        claim,
        influence,
        proposal,
        undoable,
      });
    },
  }),
  route({
    method: 'get',
    path: '/screening/:checkId/effect',
    policy: 'screening.read',
    params: checkParams,
    response: submissionEffectSchema,
    async handle({ deps, actor, params: { checkId } }) {
      await refuseIfHidden(signedInActor(actor), checkId);
      return findEffect(deps, checkId);
    },
  }),
  route({
    method: 'post',
    path: '/screening/:checkId/claim',
    policy: 'screening.decide',
    params: checkParams,
    response: claimResultSchema,
    handle: async ({ deps, actor, params }) => ({
      claim: await claimCheck(deps, signedInActor(actor), params.checkId),
    }),
  }),
  route({
    method: 'post',
    path: '/screening/:checkId/release',
    policy: 'screening.decide',
    params: checkParams,
    response: claimResultSchema,
    async handle({ deps, actor, params }) {
      await releaseCheck(deps, signedInActor(actor), params.checkId);
      return { claim: null };
    },
  }),
  route({
    method: 'post',
    path: '/screening/:checkId/decision',
    policy: 'screening.decide',
    params: checkParams,
    body: decisionRequestSchema,
    response: decisionResultSchema,
    async handle({ deps, actor, params: { checkId }, body }) {
      await refuseIfHidden(signedInActor(actor), checkId);
      return decide(deps, signedInActor(actor), checkId, body);
    },
  }),
  route({
    method: 'post',
    path: '/screening/:checkId/recall-at-once',
    policy: 'screening.recallAtOnce',
    params: checkParams,
    body: recallAtOnceRequestSchema,
    response: recallAtOnceSchema,
    async handle({ deps, actor, params: { checkId }, body }) {
      await refuseIfHidden(signedInActor(actor), checkId);
      return recallAtOnce(deps, signedInActor(actor), checkId, body);
    },
  }),
  route({
    method: 'post',
    path: '/checks/:checkId/objection',
    policy: 'checks.update',
    limit: 'submission',
    params: checkParams,
    body: objectionRequestSchema,
    response: checkSchema,
    async handle({ deps, actor, params: { checkId }, body }) {
      await objectToCorrection(deps, signedInActor(actor), checkId, body);
      return presentCheck((await findOwnCheck(actor, 'checks.read', checkId)).check);
    },
  }),
];
