import { addMonths, calendarDateOf } from '@/lib/units';

import { Reminder } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import { readLinkToken } from '../mail/linkTokens';
import { dueOn } from './dueDate';
import { findReminded } from './queries';

const laterMonths = 1;

/**
 * Puts a reminder off by a month, by the token of its mail. A reminder that has been dealt with since, by a check, by
 * another date or by this link before, stays as it is.
 * @returns the day the next reminder comes; null when none does
 * @throws AppError notFound for a token that is not ours, gone for a bank that is not there any more
 */
export async function remindLater({ config, db, clock }: Deps, token: string): Promise<string | null> {
  const grant = readLinkToken(token, 'remindLater', config.secret);
  if (!grant) throw new AppError('notFound', 'This link is not complete. Open it from the mail again.');
  const { bankId } = grant;
  return db.transaction(async (transaction) => {
    const reminded = await findReminded(bankId, transaction);
    if (!reminded || reminded.owner.erasedAt !== null) throw new AppError('gone');
    if (reminded.chosen?.isOn === false) return null;
    const standing = dueOn(reminded);
    if (standing !== grant.dueOn) return standing;
    const later = addMonths(calendarDateOf(clock()), laterMonths);
    const setAfter = reminded.lastTestedOn;
    await Reminder.upsert({ bankId, isOn: true, dueOn: later, setAfter }, { transaction });
    return later;
  });
}
