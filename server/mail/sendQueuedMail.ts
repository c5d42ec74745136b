import nodemailer from 'nodemailer';

import type { Config } from '../config';
import { OutboxMail } from '../db/models';
import type { Deps } from '../deps';

/** SMTP by configuration; without it mail is only kept in the outbox table, where the demo's page shows it. */
function createTransport({ smtpUrl }: Config) {
  return smtpUrl ? nodemailer.createTransport(smtpUrl) : nodemailer.createTransport({ jsonTransport: true });
}

/**
 * Job: sends every queued mail, oldest first. The message id is the row's, so that a mail handed over just before a
 * kill and sent again is seen as the same one. A mail that was refused for good stands
 * failed and is not tried again by itself. Throws after the round if another could not be handed over.
 */
export function sendQueuedMail({ config, clock, logger }: Deps): () => Promise<void> {
  const transport = createTransport(config);
  return async () => {
    const queued = await OutboxMail.findAll({ where: { state: 'queued' }, order: [['createdAt', 'ASC']] });
    let failures = 0;
    for (const mail of queued) {
      try {
        await transport.sendMail({
          from: config.mailFrom,
          to: mail.recipient,
          subject: mail.subject,
          text: mail.text,
          headers: mail.headers ?? {},
          messageId: `<${mail.id}@ebbline.invalid>`,
        });
        await mail.update({ state: 'sent', sentAt: clock(), problem: null });
      } catch (error) {
        const isFinal = isRefusedForGood(error);
        if (!isFinal) failures += 1;
        logger.warn({ err: error, isFinal }, 'a mail could not be handed over');
        const problem = error instanceof Error ? error.message : String(error);
        await mail.update({ problem, ...(isFinal ? { state: 'failed' } : {}) });
      }
    }
    if (failures > 0) throw new Error(`${failures} of ${queued.length} mails could not be handed over`);
  };
}

/** By the reply code of SMTP (RFC 5321, 4.2.1): 5 says that the same would be refused again. */
const isRefusedForGood = (error: unknown) =>
  error instanceof Error &&
  'responseCode' in error &&
  typeof error.responseCode === 'number' &&
  error.responseCode >= 500;
