import type { z } from 'zod';

import type { setReminderRequestSchema } from '@/lib/contract/reminders';
import { addMonths, calendarDateOf } from '@/lib/units';

import { findOwnBank } from '../banks/queries';
import { Reminder } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { findLastTestedOn } from './queries';

const farthestMonths = 60;

/**
 * Sets when a bank's owner is reminded of its next check, or that they are not.
 * @throws AppError notFound, invalid (a day in the past or more than five years ahead)
 */
export async function setReminder(
  { db, clock }: Deps,
  actor: SignedInActor,
  bankId: string,
  { isOn, dueOn }: z.output<typeof setReminderRequestSchema>,
): Promise<void> {
  const today = calendarDateOf(clock());
  await db.transaction(async (transaction) => {
    await findOwnBank(actor, 'reminders.update', bankId, transaction);
    if (dueOn !== null && dueOn < today)
      throw new AppError('invalid', undefined, { dueOn: 'This day is over. Choose one to come.' });
    if (dueOn !== null && dueOn > addMonths(today, farthestMonths))
      throw new AppError('invalid', undefined, { dueOn: 'Choose a day within the next five years.' });
    const setAfter = (await findLastTestedOn([bankId], transaction)).get(bankId) ?? null;
    await Reminder.upsert({ bankId, isOn, dueOn, setAfter }, { transaction });
  });
}
