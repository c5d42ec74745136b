import type { Reminder as ReminderContract } from '@/lib/contract/reminders';

import { dueOn, ownDueOn } from './dueDate';
import type { RemindedBank } from './queries';

/** A bank's reminder for its owner. */
export function presentReminder(reminded: RemindedBank): ReminderContract {
  const { bank, owner, chosen, lastTestedOn, isEnded } = reminded;
  return {
    bankId: bank.id,
    isOn: chosen?.isOn ?? true,
    dueOn: dueOn(reminded),
    ownDueOn: ownDueOn(reminded),
    lastTestedOn,
    isEnded,
    isMailed: owner.noticeReminders,
  };
}
