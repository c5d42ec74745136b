import type { NoticeChoice, NoticeKind } from '@/lib/contract/reminders';

import type { User } from '../db/models';

/** The column that holds an account's choice about a kind of mail. */
export const noticeColumns = {
  reminders: 'noticeReminders',
  decisions: 'noticeDecisions',
  releases: 'noticeReleases',
} as const satisfies Record<NoticeKind, keyof User>;

export const noticeChoiceOf = (user: User): NoticeChoice => ({
  reminders: user.noticeReminders,
  decisions: user.noticeDecisions,
  releases: user.noticeReleases,
});

/** A kind of mail in the words of its footer. */
export const noticeWords: Record<NoticeKind, string> = {
  reminders: 'reminders of the yearly check',
  decisions: 'questions and decisions about your checks',
  releases: 'news of releases',
};
