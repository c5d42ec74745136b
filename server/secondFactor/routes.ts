import { acceptedSchema } from '@/lib/contract/accounts';
import {
  beginSecondFactorRequestSchema,
  confirmSecondFactorRequestSchema,
  passwordAndCodeRequestSchema,
  recoveryCodesSchema,
  secondFactorOfferSchema,
  secondFactorSchema,
} from '@/lib/contract/secondFactor';

import { RecoveryCode } from '../db/models';
import { route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { renewRecoveryCodes, turnOff } from './change';
import { findConfirmedFactor } from './secondFactorOf';
import { beginSetUp, confirmSetUp } from './setUp';

/** What somebody sets up about the second step of their own sign-in. */
export const secondFactorRoutes: Route[] = [
  route({
    method: 'get',
    path: '/account/second-factor',
    policy: 'accounts.own',
    response: secondFactorSchema,
    async handle({ deps, actor }) {
      const { userId, role } = signedInActor(actor);
      const factor = await findConfirmedFactor(userId);
      const where = { userId, usedAt: null };
      return {
        isOn: factor !== null,
        since: factor?.confirmedAt?.toISOString() ?? null,
        recoveryCodesLeft: factor ? await RecoveryCode.count({ where }) : 0,
        isRequired: deps.config.requiresSecondFactor && role !== 'owner',
      };
    },
  }),
  route({
    method: 'post',
    path: '/account/second-factor/begin',
    policy: 'accounts.own',
    limit: 'signIn',
    body: beginSecondFactorRequestSchema,
    response: secondFactorOfferSchema,
    handle: ({ deps, actor, body }) => beginSetUp(deps, signedInActor(actor), body.currentPassword),
  }),
  route({
    method: 'post',
    path: '/account/second-factor/confirm',
    policy: 'accounts.own',
    limit: 'signIn',
    body: confirmSecondFactorRequestSchema,
    response: recoveryCodesSchema,
    handle: async ({ deps, actor, body }) => ({
      recoveryCodes: await confirmSetUp(deps, signedInActor(actor), body.code),
    }),
  }),
  route({
    method: 'post',
    path: '/account/second-factor/recovery-codes',
    policy: 'accounts.own',
    limit: 'signIn',
    body: passwordAndCodeRequestSchema,
    response: recoveryCodesSchema,
    handle: async ({ deps, actor, body }) => ({
      recoveryCodes: await renewRecoveryCodes(deps, signedInActor(actor), body),
    }),
  }),
  route({
    method: 'post',
    path: '/account/second-factor/turn-off',
    policy: 'accounts.own',
    limit: 'signIn',
    body: passwordAndCodeRequestSchema,
    response: acceptedSchema,
    async handle({ deps, actor, body }) {
      await turnOff(deps, signedInActor(actor), body);
      return { accepted: true } as const;
    },
  }),
];
