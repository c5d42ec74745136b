import { z } from 'zod';

import {
  bankListSchema,
  bankSchema,
  createBankEventRequestSchema,
  createBankRequestSchema,
  updateBankRequestSchema,
} from '@/lib/contract/banks';
import { idSchema } from '@/lib/contract/fields';

import { route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { addBankEvent } from './addBankEvent';
import { createBank } from './createBank';
import { presentBank, presentBanks } from './present';
import { findBanksOf, findOwnBank } from './queries';
import { updateBank } from './updateBank';

const bankParams = z.object({ bankId: idSchema });

export const bankRoutes: Route[] = [
  route({
    method: 'get',
    path: '/banks',
    policy: 'banks.list',
    response: bankListSchema,
    handle: async ({ actor }) => ({
      banks: await presentBanks(await findBanksOf(signedInActor(actor).userId)),
    }),
  }),
  route({
    method: 'post',
    path: '/banks',
    policy: 'banks.create',
    limit: 'submission',
    body: createBankRequestSchema,
    response: bankSchema,
    status: 201,
    async handle({ deps, actor, body }) {
      const bankId = await createBank(deps, signedInActor(actor), body);
      return presentBank(await findOwnBank(actor, 'banks.read', bankId));
    },
  }),
  route({
    method: 'get',
    path: '/banks/:bankId',
    policy: 'banks.read',
    params: bankParams,
    response: bankSchema,
    handle: async ({ actor, params }) => presentBank(await findOwnBank(actor, 'banks.read', params.bankId)),
  }),
  route({
    method: 'put',
    path: '/banks/:bankId',
    policy: 'banks.update',
    params: bankParams,
    body: updateBankRequestSchema,
    response: bankSchema,
    async handle({ deps, actor, params, body }) {
      await updateBank(deps, signedInActor(actor), params.bankId, body);
      return presentBank(await findOwnBank(actor, 'banks.read', params.bankId));
    },
  }),
  route({
    method: 'post',
    path: '/banks/:bankId/events',
    policy: 'banks.update',
    limit: 'submission',
    params: bankParams,
    body: createBankEventRequestSchema,
    response: bankSchema,
    status: 201,
    async handle({ deps, actor, params, body }) {
      await addBankEvent(deps, signedInActor(actor), params.bankId, body);
      return presentBank(await findOwnBank(actor, 'banks.read', params.bankId));
    },
  }),
];
