import {
  acceptedSchema,
  demoAccountsSchema,
  registerRequestSchema,
  requestResetRequestSchema,
  resendVerificationRequestSchema,
  resetRequestSchema,
  sessionSchema,
  signInAnswerSchema,
  signInRequestSchema,
  signOutRequestSchema,
  verifyRequestSchema,
} from '@/lib/contract/accounts';
import { signInCodeRequestSchema } from '@/lib/contract/secondFactor';

import { AppError } from '../errors';
import type { Csrf } from '../http/csrf';
import { route, type Route } from '../http/route';
import { clearSessionCookies, clearStepCookie, refreshTokenOf, setStepCookie, stepTokenOf } from './cookies';
import { demoAccounts } from './demoAccounts';
import { ownAccountRoutes } from './ownRoutes';
import { refreshSession } from './refreshSession';
import { registerAccount } from './registerAccount';
import { requestReset } from './requestReset';
import { resendVerification } from './resendVerification';
import { resetPassword } from './resetPassword';
import { beginSession, sessionAnswer } from './sessionAnswer';
import { signIn, signInByCode } from './signIn';
import { signOut } from './signOut';
import { verifyAddress } from './verifyAddress';

const accepted = { accepted: true } as const;

/** Registration and what goes by mail: their answers do not tell whether an address has an account. */
const mailRoutes: Route[] = [
  route({
    method: 'post',
    path: '/account/register',
    policy: 'accounts.open',
    limit: 'signIn',
    body: registerRequestSchema,
    response: acceptedSchema,
    status: 202,
    async handle({ deps, body }) {
      await registerAccount(deps, body);
      return accepted;
    },
  }),
  route({
    method: 'post',
    path: '/account/verify',
    policy: 'accounts.open',
    limit: 'signIn',
    body: verifyRequestSchema,
    response: acceptedSchema,
    async handle({ deps, body }) {
      await verifyAddress(deps, body.token);
      return accepted;
    },
  }),
  route({
    method: 'post',
    path: '/account/resend-verification',
    policy: 'accounts.open',
    limit: 'reset',
    body: resendVerificationRequestSchema,
    response: acceptedSchema,
    status: 202,
    async handle({ deps, body }) {
      await resendVerification(deps, body.email);
      return accepted;
    },
  }),
  route({
    method: 'post',
    path: '/account/request-reset',
    policy: 'accounts.open',
    limit: 'reset',
    body: requestResetRequestSchema,
    response: acceptedSchema,
    status: 202,
    async handle({ deps, body }) {
      await requestReset(deps, body.email);
      return accepted;
    },
  }),
  route({
    method: 'post',
    path: '/account/reset',
    policy: 'accounts.open',
    limit: 'reset',
    body: resetRequestSchema,
    response: acceptedSchema,
    async handle({ deps, res, body }) {
      await resetPassword(deps, body);
      clearSessionCookies(deps.config, res);
      return accepted;
    },
  }),
];

const sessionRoutes = (csrf: Csrf): Route[] => [
  route({
    method: 'get',
    path: '/account/session',
    policy: 'accounts.open',
    response: sessionSchema,
    handle: ({ actor, ...exchange }) =>
      sessionAnswer(csrf, exchange, actor, refreshTokenOf(exchange.req) !== undefined),
  }),
  route({
    method: 'post',
    path: '/account/sign-in',
    policy: 'accounts.open',
    limit: 'signIn',
    body: signInRequestSchema,
    response: signInAnswerSchema,
    async handle({ body, actor, ...exchange }) {
      const { deps, res } = exchange;
      const result = await signIn(deps, body);
      if ('actor' in result) return { ...(await beginSession(csrf, exchange, result)), asksForCode: false };
      setStepCookie(deps.config, res, result.stepToken);
      return { ...(await sessionAnswer(csrf, exchange, actor)), asksForCode: true };
    },
  }),
  route({
    method: 'post',
    path: '/account/sign-in-code',
    policy: 'accounts.open',
    limit: 'signIn',
    body: signInCodeRequestSchema,
    response: sessionSchema,
    async handle({ body, ...exchange }) {
      const { deps, req, res } = exchange;
      const signedIn = await signInByCode(deps, stepTokenOf(req), body.code);
      clearStepCookie(deps.config, res);
      return beginSession(csrf, exchange, signedIn);
    },
  }),
  route({
    method: 'post',
    path: '/account/refresh',
    policy: 'accounts.open',
    response: sessionSchema,
    async handle(exchange) {
      const { deps, req, res } = exchange;
      const next = await refreshSession(deps, refreshTokenOf(req));
      if (next) return beginSession(csrf, exchange, next);
      clearSessionCookies(deps.config, res);
      throw new AppError('sessionEnded');
    },
  }),
  route({
    method: 'post',
    path: '/account/sign-out',
    policy: 'accounts.open',
    body: signOutRequestSchema,
    response: sessionSchema,
    async handle({ actor, body, ...exchange }) {
      const { deps, req, res } = exchange;
      await signOut(deps, actor, { everywhere: body.everywhere, refreshToken: refreshTokenOf(req) });
      clearSessionCookies(deps.config, res);
      return sessionAnswer(csrf, exchange, { role: 'visitor' });
    },
  }),
];

const demoRoutes: Route[] = [
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

export const accountRoutes = (csrf: Csrf): Route[] => [
  ...sessionRoutes(csrf),
  ...mailRoutes,
  ...ownAccountRoutes,
  ...demoRoutes,
];
