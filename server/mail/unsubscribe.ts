import type { NoticeKind } from '@/lib/contract/reminders';

import { User } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { readLinkToken } from './linkTokens';
import { noticeColumns } from './notices';

/**
 * Stops one kind of mail by the token of a mail of that kind. Asking again changes nothing.
 * @throws AppError notFound for a token that is not ours
 */
export async function unsubscribe({ config }: Deps, token: string): Promise<NoticeKind> {
  const grant = readLinkToken(token, 'unsubscribe', config.secret);
  if (!grant) throw new AppError('notFound', 'This link is not complete. Open it from the mail again.');
  await User.update({ [noticeColumns[grant.kind]]: false }, { where: { id: grant.userId } });
  return grant.kind;
}
