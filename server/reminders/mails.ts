import { formatDate } from '@/lib/units';

interface ReminderFacts {
  today: string;
  bankName: string;
  lastTestedOn: string | null;
  dueOn: string;
  bankLink: string;
  laterLink: string;
}

/** The yearly mail of one bank. */
export function reminderMail({ today, bankName, lastTestedOn, dueOn, bankLink, laterLink }: ReminderFacts) {
  const isDue = dueOn < today ? 'has been due since' : 'is due on';
  const due = lastTestedOn
    ? `the last check of your bank "${bankName}" was on ${formatDate(lastTestedOn)}, and the next one ${isDue} ${formatDate(dueOn)}.`
    : `the first check of your bank "${bankName}" ${isDue} ${formatDate(dueOn)}.`;
  return {
    subject: `A capacity check is due: ${bankName}`,
    text: [
      'Good day,',
      due,
      'At 0.2 It the discharge takes about five hours, and the bank is full before it and rested. What to prepare, and the cautions, stand at the start of the check:',
      `${bankLink}/check`,
      'Not now? This page puts the reminder off by a month, without signing in:',
      laterLink,
      'Another date, a calendar entry, or no reminder for this bank. A bank that was sold or retired is noted there too; it counts as well:',
      bankLink,
    ].join('\n\n'),
  };
}
