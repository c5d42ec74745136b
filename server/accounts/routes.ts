import { demoAccountsSchema, sessionSchema } from '@/lib/contract/accounts';

import { AppError } from '../errors';
import type { Csrf } from '../http/csrf';
import { route, type Route } from '../http/route';
import { refreshTokenOf } from './cookies';
import { demoAccounts } from './demoAccounts';
import { sessionAnswer } from './sessionAnswer';

export const accountRoutes = (csrf: Csrf): Route[] => [
  route({
    method: 'get',
    path: '/account/session',
    policy: 'accounts.open',
    response: sessionSchema,
    handle: ({ actor, ...exchange }) =>
      sessionAnswer(csrf, exchange, actor, refreshTokenOf(exchange.req) !== undefined),
  }),
  route({
    method: 'get',
    path: '/account/demo-accounts',
    policy: 'accounts.open',
    response: demoAccountsSchema,
    async handle({ deps }) {
      if (!deps.config.isDemo) throw new AppError('notFound');
      return { accounts: [...demoAccounts] };
    },
  }),
];
