import { z } from 'zod';

import { idSchema } from '@/lib/contract/fields';
import {
  linkQuerySchema,
  remindedLaterSchema,
  reminderSchema,
  remindLaterRequestSchema,
  setReminderRequestSchema,
  unsubscribedSchema,
} from '@/lib/contract/reminders';

import { findOwnBank } from '../banks/queries';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { rawRoute, route, type Route } from '../http/route';
import { linkBase } from '../mail/linkBase';
import { unsubscribe } from '../mail/unsubscribe';
import { type Actor, signedInActor } from '../policies';
import { dueCalendarFile } from './calendar';
import { dueOn } from './dueDate';
import { presentReminder } from './present';
import { findReminded, type RemindedBank } from './queries';
import { remindLater } from './remindLater';
import { setReminder } from './setReminder';

const bankParams = z.object({ bankId: idSchema });

async function readReminder({ db }: Deps, actor: Actor, bankId: string): Promise<RemindedBank> {
  await findOwnBank(actor, 'reminders.read', bankId);
  const reminded = await db.transaction((transaction) => findReminded(bankId, transaction));
  if (!reminded) throw new AppError('notFound');
  return reminded;
}

const ofBank: Route[] = [
  route({
    method: 'get',
    path: '/banks/:bankId/reminder',
    policy: 'reminders.read',
    params: bankParams,
    response: reminderSchema,
    handle: async ({ deps, actor, params }) =>
      presentReminder(await readReminder(deps, actor, params.bankId)),
  }),
  route({
    method: 'put',
    path: '/banks/:bankId/reminder',
    policy: 'reminders.update',
    params: bankParams,
    body: setReminderRequestSchema,
    response: reminderSchema,
    async handle({ deps, actor, params, body }) {
      await setReminder(deps, signedInActor(actor), params.bankId, body);
      return presentReminder(await readReminder(deps, actor, params.bankId));
    },
  }),
  rawRoute({
    method: 'get',
    path: '/banks/:bankId/reminder.ics',
    policy: 'reminders.read',
    params: bankParams,
    async handle({ deps, actor, params }) {
      const reminded = await readReminder(deps, actor, params.bankId);
      const day = dueOn(reminded);
      if (day === null)
        throw new AppError('conflict', 'No check is due for this bank, so there is no day to save.');
      const content = dueCalendarFile(deps, reminded, day);
      return { type: 'text/calendar; charset=utf-8', filename: `check-${day}.ics`, content };
    },
  }),
];

/** What links in mails do. A GET changes nothing: programs that look at links must not act by it. */
const ofLinks: Route[] = [
  route({
    method: 'post',
    path: '/reminders/later',
    policy: 'links.use',
    body: remindLaterRequestSchema,
    response: remindedLaterSchema,
    handle: async ({ deps, body }) => ({ dueOn: await remindLater(deps, body.token) }),
  }),
  // RFC 8058: a mail program posts here by itself, without cookies, when its reader presses "unsubscribe".
  route({
    method: 'post',
    path: '/unsubscribe',
    policy: 'links.use',
    isTokenBound: true,
    query: linkQuerySchema,
    response: unsubscribedSchema,
    handle: async ({ deps, query }) => ({ kind: await unsubscribe(deps, query.token) }),
  }),
  // RFC 2369: one that can't post opens the same address in a browser.
  rawRoute({
    method: 'get',
    path: '/unsubscribe',
    policy: 'links.use',
    query: linkQuerySchema,
    handle: async ({ deps, query }) => ({
      redirect: `${linkBase(deps.config.publicUrl)}/unsubscribe?token=${encodeURIComponent(query.token)}`,
    }),
  }),
];

export const reminderRoutes: Route[] = [...ofBank, ...ofLinks];
