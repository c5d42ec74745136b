import { deleteAccountRequestSchema, sessionSchema } from '@/lib/contract/accounts';
import { calendarDateOf } from '@/lib/units';

import { clearSessionCookies } from '../accounts/cookies';
import { sessionAnswer } from '../accounts/sessionAnswer';
import type { Csrf } from '../http/csrf';
import { rawRoute, route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { checksCsv } from './checksCsv';
import { deleteAccount } from './deleteAccount';
import { gatherOwnData } from './gather';

const jsonIndent = 2;

export const ownDataRoutes = (csrf: Csrf): Route[] => [
  rawRoute({
    method: 'get',
    path: '/account/own-data.json',
    policy: 'ownData.read',
    async handle({ deps, actor }) {
      const now = deps.clock();
      const data = await gatherOwnData(signedInActor(actor).userId, now);
      return {
        type: 'application/json; charset=utf-8',
        filename: `ebbline-own-data-${calendarDateOf(now)}.json`,
        content: `${JSON.stringify(data, null, jsonIndent)}\n`,
      };
    },
  }),
  rawRoute({
    method: 'get',
    path: '/account/checks.csv',
    policy: 'ownData.read',
    handle: async ({ deps, actor }) => ({
      type: 'text/csv; charset=utf-8',
      filename: `ebbline-checks-${calendarDateOf(deps.clock())}.csv`,
      content: await checksCsv(signedInActor(actor).userId),
    }),
  }),
  route({
    method: 'post',
    path: '/account/delete',
    policy: 'ownData.erase',
    limit: 'signIn',
    body: deleteAccountRequestSchema,
    response: sessionSchema,
    async handle({ actor, body, ...exchange }) {
      const { deps, res } = exchange;
      await deleteAccount(deps, signedInActor(actor), body);
      clearSessionCookies(deps.config, res);
      return sessionAnswer(csrf, exchange, { role: 'visitor' });
    },
  }),
];
