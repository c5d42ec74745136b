import type { Transaction } from 'sequelize';

import type { NoticeKind } from '@/lib/contract/reminders';

import type { User } from '../db/models';
import type { Deps } from '../deps';
import { linkToken } from './linkTokens';
import { noticeColumns, noticeWords } from './notices';
import { linkBase } from './linkBase';
import { queueMail } from './queueMail';

interface NoticeRequest {
  kind: NoticeKind;
  subject: string;
  text: string;
  onceKey: string;
}

/**
 * Queues a mail that its reader may do without, unless they said so; answers whether it did. It ends with a link that
 * stops its kind without a sign-in, and carries the headers by which mail programs offer the same (RFC 2369, and RFC
 * 8058 for one press).
 */
export async function queueNotice(
  deps: Deps,
  user: User,
  { kind, subject, text, onceKey }: NoticeRequest,
  transaction: Transaction,
): Promise<boolean> {
  if (user.erasedAt !== null || !user[noticeColumns[kind]]) return false;
  const { publicUrl, secret } = deps.config;
  const query = `token=${linkToken({ may: 'unsubscribe', userId: user.id, kind }, secret)}`;
  const footer = [
    `You get ${noticeWords[kind]} because your account asks for them.`,
    `To stop them, without signing in: ${linkBase(publicUrl)}/unsubscribe?${query}`,
  ].join('\n');
  const headers = {
    'List-Unsubscribe': `<${linkBase(publicUrl)}/api/unsubscribe?${query}>`,
    'List-Unsubscribe-Post': 'List-Unsubscribe=One-Click',
  };
  const mail = {
    to: user.email,
    userId: user.id,
    subject,
    text: `${text.trimEnd()}\n\n${footer}\n`,
    onceKey,
  };
  await queueMail(deps, { ...mail, headers }, transaction);
  return true;
}
