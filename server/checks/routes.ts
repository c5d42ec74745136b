import { z } from 'zod';

import {
  answerRequestSchema,
  checkListSchema,
  checkSchema,
  resubmitCheckRequestSchema,
  submitCheckRequestSchema,
  withdrawRequestSchema,
} from '@/lib/contract/checks';
import { idSchema } from '@/lib/contract/fields';

import { findOwnBank } from '../banks/queries';
import { route, type Route } from '../http/route';
import { type Actor, signedInActor } from '../policies';
import { answerQuestion } from './answerQuestion';
import { presentCheck, presentChecks } from './present';
import { findChecksOf, findOwnCheck } from './queries';
import { resubmitCheck } from './resubmitCheck';
import { submitCheck } from './submitCheck';
import { withdrawCheck } from './withdrawCheck';

const bankParams = z.object({ bankId: idSchema });
const checkParams = z.object({ checkId: idSchema });

const readCheck = async (actor: Actor, checkId: string) =>
  presentCheck((await findOwnCheck(actor, 'checks.read', checkId)).check);

export const checkRoutes: Route[] = [
  route({
    method: 'get',
    path: '/banks/:bankId/checks',
    policy: 'checks.read',
    params: bankParams,
    response: checkListSchema,
    async handle({ actor, params }) {
      const { id } = await findOwnBank(actor, 'checks.read', params.bankId);
      return { checks: await presentChecks(await findChecksOf(id)) };
    },
  }),
  route({
    method: 'post',
    path: '/banks/:bankId/checks',
    policy: 'checks.create',
    limit: 'submission',
    params: bankParams,
    body: submitCheckRequestSchema,
    response: checkSchema,
    status: 201,
    handle: async ({ deps, actor, params, body }) =>
      readCheck(actor, await submitCheck(deps, signedInActor(actor), params.bankId, body)),
  }),
  route({
    method: 'get',
    path: '/checks/:checkId',
    policy: 'checks.read',
    params: checkParams,
    response: checkSchema,
    handle: async ({ actor, params }) => readCheck(actor, params.checkId),
  }),
  route({
    method: 'put',
    path: '/checks/:checkId',
    policy: 'checks.update',
    limit: 'submission',
    params: checkParams,
    body: resubmitCheckRequestSchema,
    response: checkSchema,
    async handle({ deps, actor, params, body }) {
      await resubmitCheck(deps, signedInActor(actor), params.checkId, body);
      return readCheck(actor, params.checkId);
    },
  }),
  route({
    method: 'post',
    path: '/checks/:checkId/answer',
    policy: 'checks.update',
    limit: 'submission',
    params: checkParams,
    body: answerRequestSchema,
    response: checkSchema,
    async handle({ deps, actor, params, body }) {
      await answerQuestion(deps, signedInActor(actor), params.checkId, body);
      return readCheck(actor, params.checkId);
    },
  }),
  route({
    method: 'post',
    path: '/checks/:checkId/withdraw',
    policy: 'checks.update',
    limit: 'submission',
    params: checkParams,
    body: withdrawRequestSchema,
    response: checkSchema,
    async handle({ deps, actor, params, body }) {
      await withdrawCheck(deps, signedInActor(actor), params.checkId, body);
      return readCheck(actor, params.checkId);
    },
  }),
];
