import type { Transaction } from 'sequelize';

import { OutboxMail } from '../db/models';
import type { Deps } from '../deps';

interface MailRequest {
  to: string;
  subject: string;
  text: string;
  /** Mails of one key are written once, however often they are asked for. */
  onceKey?: string;
}

/** Writes a mail into the outbox in the caller's transaction; it is sent after the commit. */
export async function queueMail({ jobs }: Deps, mail: MailRequest, transaction: Transaction): Promise<void> {
  const { to, subject, text, onceKey = null } = mail;
  await OutboxMail.bulkCreate([{ recipient: to, subject, text, state: 'queued', onceKey }], {
    transaction,
    ignoreDuplicates: true,
  });
  await jobs.enqueue({ kind: 'sendMail', dedupeKey: 'sendMail' }, transaction);
}
