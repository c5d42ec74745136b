import { outboxSchema } from '@/lib/contract/accounts';

import { OutboxMail } from '../db/models';
import { AppError } from '../errors';
import { route, type Route } from '../http/route';
import { presentMail } from './present';

const shownMails = 100;

export const outboxRoutes: Route[] = [
  route({
    method: 'get',
    path: '/outbox',
    policy: 'outbox.read',
    response: outboxSchema,
    async handle({ deps }) {
      // Mails hold links that let one in. Once they leave by SMTP the addresses are real people's.
      if (!deps.config.isDemo || deps.config.smtpUrl) throw new AppError('notFound');
      const mails = await OutboxMail.findAll({ order: [['createdAt', 'DESC']], limit: shownMails });
      return { messages: mails.map(presentMail) };
    },
  }),
];
