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
 * kill and sent again is seen as the same one. Throws after the round if one could not be handed over.
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
        await mail.update({ state: 'sent', sentAt: clock() });
      } catch (error) {
        failures += 1;
        logger.warn({ err: error }, 'a mail could not be handed over');
      }
    }
    if (failures > 0) throw new Error(`${failures} of ${queued.length} mails could not be handed over`);
  };
}
