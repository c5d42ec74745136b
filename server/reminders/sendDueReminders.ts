import type { Transaction } from 'sequelize';

import { addMonths, calendarDateOf } from '@/lib/units';

import { Bank, Reminder } from '../db/models';
import type { Deps } from '../deps';
import type { JobHandler } from '../jobs/JobRunner';
import { linkBase } from '../mail/linkBase';
import { linkToken } from '../mail/linkTokens';
import { queueNotice } from '../mail/queueNotice';
import { dueOn } from './dueDate';
import { reminderMail } from './mails';
import { findLastTestedOn, findReminded, type RemindedBank } from './queries';

/** What came due longer ago is not written about any more: the owner has seen it on the bank's page. */
const latestMonths = 2;

/**
 * Job: queues a mail for each bank whose check has come due. The key of a mail is its bank and its day, so that it is
 * written once, however often this runs.
 */
export function sendDueReminders(deps: Deps): JobHandler {
  return () =>
    deps.db.transaction(async (transaction) => {
      const today = calendarDateOf(deps.clock());
      const earliest = addMonths(today, -latestMonths);
      for (const bankId of await findCandidates(today, earliest, transaction)) {
        const reminded = await findReminded(bankId, transaction);
        if (!reminded || reminded.chosen?.isOn === false) continue;
        const due = dueOn(reminded);
        if (due === null || due > today || due <= earliest) continue;
        await queueReminder(deps, reminded, { due, today }, transaction);
      }
    });
}

/** Banks that may be due: by their last check, or by a date of their own. */
async function findCandidates(today: string, earliest: string, transaction: Transaction): Promise<string[]> {
  const isDue = (day: string | null) => day !== null && day <= today && day > earliest;
  const lastTestedOn = await findLastTestedOn('all', transaction);
  const byCheck = [...lastTestedOn].filter(([, day]) =>
    isDue(dueOn({ lastTestedOn: day, isEnded: false, chosen: null })),
  );
  const chosen = await Reminder.findAll({ where: { isOn: true }, transaction });
  const byChoice = chosen.filter(({ dueOn: day }) => isDue(day));
  const ids = new Set([...byCheck.map(([bankId]) => bankId), ...byChoice.map(({ bankId }) => bankId)]);
  const banks = await Bank.findAll({
    attributes: ['id'],
    where: { id: [...ids] },
    order: [['id', 'ASC']],
    transaction,
  });
  return banks.map(({ id }) => id);
}

async function queueReminder(
  deps: Deps,
  { bank, owner, lastTestedOn }: RemindedBank,
  { due, today }: { due: string; today: string },
  transaction: Transaction,
): Promise<void> {
  const base = linkBase(deps.config.publicUrl);
  const later = linkToken({ may: 'remindLater', bankId: bank.id, dueOn: due }, deps.config.secret);
  const mail = reminderMail({
    today,
    bankName: bank.name,
    lastTestedOn,
    dueOn: due,
    bankLink: `${base}/banks/${bank.id}`,
    laterLink: `${base}/remind-later?token=${later}`,
  });
  const onceKey = `reminder:${bank.id}:${due}`;
  await queueNotice(deps, owner, { kind: 'reminders', ...mail, onceKey }, transaction);
}
