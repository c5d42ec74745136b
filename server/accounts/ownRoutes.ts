import {
  acceptedSchema,
  changeEmailRequestSchema,
  changePasswordRequestSchema,
  confirmEmailRequestSchema,
} from '@/lib/contract/accounts';
import { noticeChoiceSchema } from '@/lib/contract/reminders';

import { route, type Route } from '../http/route';
import { signedInActor } from '../policies';
import { changeEmail } from './changeEmail';
import { changePassword } from './changePassword';
import { chooseNotices, readNotices } from './chooseNotices';
import { confirmEmail } from './confirmEmail';

const accepted = { accepted: true } as const;

/** What somebody changes about their own account. */
export const ownAccountRoutes: Route[] = [
  route({
    method: 'post',
    path: '/account/change-password',
    policy: 'accounts.own',
    limit: 'signIn',
    body: changePasswordRequestSchema,
    response: acceptedSchema,
    async handle({ deps, actor, body }) {
      await changePassword(deps, signedInActor(actor), body);
      return accepted;
    },
  }),
  route({
    method: 'post',
    path: '/account/change-email',
    policy: 'accounts.own',
    limit: 'reset',
    body: changeEmailRequestSchema,
    response: acceptedSchema,
    status: 202,
    async handle({ deps, actor, body }) {
      await changeEmail(deps, signedInActor(actor), body);
      return accepted;
    },
  }),
  route({
    method: 'post',
    path: '/account/confirm-email',
    policy: 'accounts.open',
    limit: 'signIn',
    body: confirmEmailRequestSchema,
    response: acceptedSchema,
    async handle({ deps, body }) {
      await confirmEmail(deps, body.token);
      return accepted;
    },
  }),
  route({
    method: 'get',
    path: '/account/notices',
    policy: 'accounts.own',
    response: noticeChoiceSchema,
    handle: ({ actor }) => readNotices(signedInActor(actor)),
  }),
  route({
    method: 'put',
    path: '/account/notices',
    policy: 'accounts.own',
    body: noticeChoiceSchema,
    response: noticeChoiceSchema,
    async handle({ deps, actor, body }) {
      await chooseNotices(deps, signedInActor(actor), body);
      return body;
    },
  }),
];
