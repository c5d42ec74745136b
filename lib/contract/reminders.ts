import { z } from 'zod';

import { calendarDateSchema, idSchema } from './fields';

/** What mails beyond those an account needs are about; each can be switched off by itself. */
export const noticeKindSchema = z.enum(['reminders', 'decisions', 'releases']);
export type NoticeKind = z.infer<typeof noticeKindSchema>;

/** Which of them the account wants. */
export const noticeChoiceSchema = z.object({
  reminders: z.boolean(),
  decisions: z.boolean(),
  releases: z.boolean(),
});
export type NoticeChoice = z.infer<typeof noticeChoiceSchema>;

/** A bank's reminder of its next check. */
export const reminderSchema = z.object({
  bankId: idSchema,
  isOn: z.boolean(),
  /** The day the next check is due; null where nothing says when, or the bank was sold or retired. */
  dueOn: calendarDateSchema.nullable(),
  /** The day the owner chose; null = a year after the last check. */
  ownDueOn: calendarDateSchema.nullable(),
  lastTestedOn: calendarDateSchema.nullable(),
  /** The bank was sold or retired: nothing is due any more. */
  isEnded: z.boolean(),
  /** The account wants reminders by mail. */
  isMailed: z.boolean(),
});
export type Reminder = z.infer<typeof reminderSchema>;

/** `dueOn` null takes the day a year after the last check. */
export const setReminderRequestSchema = z.object({
  isOn: z.boolean(),
  dueOn: calendarDateSchema.nullable(),
});
export type SetReminderRequest = z.input<typeof setReminderRequestSchema>;

/** A signed token of a link in a mail; whoever has the mail may use it, signed in or not. */
const linkTokenSchema = z
  .string({ error: 'The link is not complete.' })
  .min(20, 'The link is not complete.')
  .max(400, 'The link is not complete.');

export const linkQuerySchema = z.object({ token: linkTokenSchema });
export const remindLaterRequestSchema = z.object({ token: linkTokenSchema });

/** The day the next reminder comes; null when the bank is not reminded of any more. */
export const remindedLaterSchema = z.object({ dueOn: calendarDateSchema.nullable() });
export const unsubscribedSchema = z.object({ kind: noticeKindSchema });
