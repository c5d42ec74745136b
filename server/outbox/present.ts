import type { Outbox } from '@/lib/contract/accounts';

import type { OutboxMail } from '../db/models';

export function presentMail(mail: OutboxMail): Outbox['messages'][number] {
  const { id, recipient, subject, text, state, createdAt } = mail;
  return { id, to: recipient, subject, text, state, createdAt: createdAt.toISOString() };
}
