import { createHmac, timingSafeEqual } from 'node:crypto';

import { z } from 'zod';

import { noticeKindSchema } from '@/lib/contract/reminders';

/** What a link in a mail may do without a sign-in, and nothing else. */
const grantSchema = z.discriminatedUnion('may', [
  /** Put off the reminder of a bank that was due on a day. */
  z.object({ may: z.literal('remindLater'), bankId: z.uuid(), dueOn: z.iso.date() }),
  /** Stop one kind of mail to an account. */
  z.object({ may: z.literal('unsubscribe'), userId: z.uuid(), kind: noticeKindSchema }),
]);
type Grant = z.infer<typeof grantSchema>;
type GrantOf<May extends Grant['may']> = Extract<Grant, { may: May }>;

const sign = (body: string, secret: string) =>
  createHmac('sha256', secret).update(`link:${body}`).digest('base64url');

/** A token that carries its grant and the server's signature over it; nothing is stored. */
export function linkToken(grant: Grant, secret: string): string {
  const body = Buffer.from(JSON.stringify(grant)).toString('base64url');
  return `${body}.${sign(body, secret)}`;
}

/** The grant of a token made for this purpose; undefined for one that was altered, cut or made for another. */
export function readLinkToken<May extends Grant['may']>(
  token: string,
  may: May,
  secret: string,
): GrantOf<May> | undefined {
  const [body = '', signature = ''] = token.split('.');
  const [given, right] = [Buffer.from(signature), Buffer.from(sign(body, secret))];
  if (given.length !== right.length || !timingSafeEqual(given, right)) return undefined;
  const grant = grantSchema.parse(JSON.parse(Buffer.from(body, 'base64url').toString('utf8')));
  return grant.may === may ? (grant as GrantOf<May>) : undefined;
}
