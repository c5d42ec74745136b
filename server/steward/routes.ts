import { acceptedSchema } from '@/lib/contract/accounts';
import {
  appointRequestSchema,
  changePersonRequestSchema,
  findPersonRequestSchema,
  foundPersonSchema,
  healthSchema,
  jobParamsSchema,
  mailParamsSchema,
  peopleSchema,
  personParamsSchema,
  trailPageSchema,
  trailQuerySchema,
} from '@/lib/contract/steward';

import type { Deps } from '../deps';
import { route, type Route } from '../http/route';
import { type SignedInActor, signedInActor } from '../policies';
import { appoint, dismiss } from './appoint';
import { requestTrailCheck } from './checkTrail';
import { clearSecondFactor } from './clearSecondFactor';
import { lockAccount, unlockAccount } from './lockAccount';
import { findPeople, findPerson } from './people';
import { readHealth } from './readHealth';
import { readTrail } from './readTrail';
import { retryJob, retryMail } from './retry';

const accepted = { accepted: true } as const;

type PersonCommand = (
  deps: Deps,
  actor: SignedInActor,
  userId: string,
  request: { reason: string; currentPassword: string },
) => Promise<void>;

/** An act upon an account: with a reason, and the steward's own password. */
const personRoute = (verb: string, command: PersonCommand) =>
  route({
    method: 'post',
    path: `/steward/people/:userId/${verb}`,
    policy: 'steward.act',
    limit: 'signIn',
    params: personParamsSchema,
    body: changePersonRequestSchema,
    response: acceptedSchema,
    async handle({ deps, actor, params, body }) {
      await command(deps, signedInActor(actor), params.userId, body);
      return accepted;
    },
  });

export const stewardRoutes: Route[] = [
  route({
    method: 'get',
    path: '/steward/people',
    policy: 'steward.read',
    response: peopleSchema,
    handle: findPeople,
  }),
  route({
    method: 'post',
    path: '/steward/people/find',
    policy: 'steward.read',
    body: findPersonRequestSchema,
    response: foundPersonSchema,
    handle: async ({ body }) => ({ person: await findPerson(body.who) }),
  }),
  route({
    method: 'post',
    path: '/steward/people/appoint',
    policy: 'steward.act',
    limit: 'signIn',
    body: appointRequestSchema,
    response: acceptedSchema,
    async handle({ deps, actor, body }) {
      await appoint(deps, signedInActor(actor), body);
      return accepted;
    },
  }),
  personRoute('dismiss', dismiss),
  personRoute('lock', lockAccount),
  personRoute('unlock', unlockAccount),
  personRoute('clear-second-factor', clearSecondFactor),
  route({
    method: 'get',
    path: '/steward/health',
    policy: 'steward.read',
    response: healthSchema,
    handle: ({ deps }) => readHealth(deps),
  }),
  route({
    method: 'post',
    path: '/steward/jobs/:jobId/retry',
    policy: 'steward.act',
    params: jobParamsSchema,
    response: acceptedSchema,
    async handle({ deps, params }) {
      await retryJob(deps, params.jobId);
      return accepted;
    },
  }),
  route({
    method: 'post',
    path: '/steward/mails/:mailId/retry',
    policy: 'steward.act',
    params: mailParamsSchema,
    response: acceptedSchema,
    async handle({ deps, params }) {
      await retryMail(deps, params.mailId);
      return accepted;
    },
  }),
  route({
    method: 'get',
    path: '/steward/trail',
    policy: 'steward.read',
    query: trailQuerySchema,
    response: trailPageSchema,
    handle: ({ query }) => readTrail(query),
  }),
  route({
    method: 'post',
    path: '/steward/trail/check',
    policy: 'steward.act',
    response: acceptedSchema,
    status: 202,
    async handle({ deps }) {
      await requestTrailCheck(deps);
      return accepted;
    },
  }),
];
