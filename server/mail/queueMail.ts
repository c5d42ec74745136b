import type { Transaction } from 'sequelize';

import { OutboxMail } from '../db/models';
import type { Deps } from '../deps';

export interface MailRequest {
  to: string;
  subject: string;
  text: string;
  /** The account the mail is for, where there is one: its mails go when it is deleted. */
  userId?: string;
  /** Mails of one key are written once, however often they are asked for. */
  onceKey?: string;
  headers?: Record<string, string>;
}

/** Writes a mail into the outbox in the caller's transaction; it is sent after the commit. */
export async function queueMail({ jobs }: Deps, mail: MailRequest, transaction: Transaction): Promise<void> {
  const { to, subject, text, onceKey = null, userId = null, headers = null } = mail;
  await OutboxMail.bulkCreate([{ recipient: to, subject, text, state: 'queued', onceKey, userId, headers }], {
    transaction,
    ignoreDuplicates: true,
  });
  await jobs.enqueue({ kind: 'sendMail', dedupeKey: 'sendMail' }, transaction);
}
