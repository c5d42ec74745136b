import { z } from 'zod';

import { cellTypeBriefSchema } from './banks';
import { fadeViewSchema } from './cells';
import { idSchema, instantSchema, text } from './fields';
import { limits } from './limits';
import { submissionSchema } from './moderation';

/** What a moderator can find of a submission; a blind verdict changes nothing on it. */
export const verdictSchema = z.enum(['approve', 'correct', 'realFailure', 'sendBack', 'turnAway'], {
  error: 'Choose what you would have decided.',
});
export type Verdict = z.infer<typeof verdictSchema>;

/** Share of decided submissions that a second moderator looks at. */
export const blindShare = 0.05;

export const blindListSchema = z.object({
  reviews: z.array(
    z.object({
      reviewId: idSchema,
      pseudonym: z.string(),
      cellType: cellTypeBriefSchema,
      layout: z.string(),
      drawnAt: instantSchema,
    }),
  ),
});
export type BlindList = z.infer<typeof blindListSchema>;

/** A submission as it stood before it was decided: no decision, and nothing that tells one. */
export const blindSubmissionSchema = submissionSchema
  .pick({
    submittedAt: true,
    isFromFile: true,
    bank: true,
    fields: true,
    computed: true,
    findings: true,
    log: true,
    history: true,
    conversation: true,
    expected: true,
  })
  .extend({ reviewId: idSchema, working: fadeViewSchema, checkId: idSchema });
export type BlindSubmission = z.infer<typeof blindSubmissionSchema>;

export const blindVerdictRequestSchema = z.object({
  verdict: verdictSchema,
  words: text(limits.noteLength.max).default(''),
});
export type BlindVerdictRequest = z.input<typeof blindVerdictRequestSchema>;

/** Told once the second verdict is given. */
export const blindOutcomeSchema = z.object({
  first: verdictSchema,
  second: verdictSchema,
  words: z.string(),
});
export type BlindOutcome = z.infer<typeof blindOutcomeSchema>;

export const agreementSchema = z.object({
  /** Decisions drawn, and how many of them have a second verdict. */
  drawn: z.number().int(),
  done: z.number().int(),
  /** How many wait for the reader. */
  waiting: z.number().int(),
  agreedFraction: z.number().nullable(),
  /** Cohen's kappa with its 90 % range; null where it is not defined. */
  kappa: z.object({ estimate: z.number(), lower: z.number(), upper: z.number(), se: z.number() }).nullable(),
  /** First decisions by row, second ones by column, in the order of `verdicts`. */
  verdicts: z.array(verdictSchema),
  counts: z.array(z.array(z.number().int())),
  differing: z.array(
    z.object({
      checkId: idSchema,
      pseudonym: z.string(),
      cellType: cellTypeBriefSchema,
      first: verdictSchema,
      firstWords: z.string(),
      second: verdictSchema,
      secondWords: z.string(),
      doneAt: instantSchema,
    }),
  ),
});
export type Agreement = z.infer<typeof agreementSchema>;
