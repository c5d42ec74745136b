import type { NoticeChoice } from '@/lib/contract/reminders';

import { User } from '../db/models';
import type { Deps } from '../deps';
import { noticeChoiceOf } from '../mail/notices';
import type { SignedInActor } from '../policies';

/** Which mails the account wants beyond those it needs. */
export async function readNotices({ userId }: SignedInActor): Promise<NoticeChoice> {
  return noticeChoiceOf(await User.findByPk(userId, { rejectOnEmpty: true }));
}

export async function chooseNotices(
  { db }: Deps,
  { userId }: SignedInActor,
  { reminders, decisions, releases }: NoticeChoice,
): Promise<void> {
  await db.transaction(async (transaction) => {
    await User.update(
      { noticeReminders: reminders, noticeDecisions: decisions, noticeReleases: releases },
      { where: { id: userId }, transaction },
    );
  });
}
