import { z } from 'zod';

import { consent } from './consent';
import { idSchema } from './fields';

/** Which bank the rows are of where the file does not say: an empty text for none. */
const ofBank = z
  .union([z.literal(''), idSchema])
  .default('')
  .transform((bankId) => (bankId === '' ? null : bankId));

/** Sent as fields of a form, beside the file. */
export const previewEarlierRequestSchema = z.object({ bankId: ofBank });

export const earlierChoiceSchema = z.enum(['allOrNothing', 'goodRows'], {
  error: 'Choose what happens when a row has a problem.',
});
export type EarlierChoice = z.infer<typeof earlierChoiceSchema>;

export const sendEarlierRequestSchema = z.object({
  bankId: ofBank,
  choice: earlierChoiceSchema,
  /** SHA-256 of the file that was looked at, so that no other is stored in its place. */
  digest: z.string().regex(/^[0-9a-f]{64}$/, 'Look at the rows first.'),
  consent: z.literal(String(consent.version), {
    error: 'The data licence has changed. Reload the page, read it and send again.',
  }),
});

/** Something wrong with a row; `column` as the file names it, null where the row as a whole is meant. */
export const rowProblemSchema = z.object({ column: z.string().nullable(), message: z.string() });
export type RowProblem = z.infer<typeof rowProblemSchema>;

/** `good`: is or can be stored. `there`: the same check stands already. `problem`: has to be corrected. */
export const rowOutcomeSchema = z.enum(['good', 'there', 'problem']);

export const earlierRowSchema = z.object({
  /** As a spreadsheet counts: the names of the columns are row 1. */
  row: z.number().int(),
  bankId: idSchema.nullable(),
  /** As the row gives it where no bank was found. */
  bankName: z.string(),
  testedOn: z.string(),
  outcome: rowOutcomeSchema,
  problems: z.array(rowProblemSchema),
  /** The check that was stored, or was there. */
  checkId: idSchema.nullable(),
  /** What the row comes to, at reference conditions. */
  capacityRefAh: z.number().nullable(),
  sohFraction: z.number().nullable(),
  /** What the screening says of it, in its owner's words, where anything stands out. */
  remarks: z.array(z.string()),
});
export type EarlierRow = z.infer<typeof earlierRowSchema>;

/** What became, or would become, of each row of a file. */
export const earlierReportSchema = z.object({
  digest: z.string(),
  isStored: z.boolean(),
  rows: z.array(earlierRowSchema),
  counts: z.object({ good: z.number().int(), there: z.number().int(), problem: z.number().int() }),
  /** How the file was read, where that may surprise. */
  notes: z.array(z.string()),
  /** The rows with a problem as a file of their own, to be corrected and sent again; null without any. */
  leftOver: z.string().nullable(),
});
export type EarlierReport = z.infer<typeof earlierReportSchema>;

/** How a template is written: what stands between values, and in a number. */
export const templateStyleSchema = z.enum(['point', 'comma']);
export const templateQuerySchema = z.object({ style: templateStyleSchema.default('point') });
