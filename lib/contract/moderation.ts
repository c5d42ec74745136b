import { z } from 'zod';

import { bankEventSchema, boughtSchema, cellTypeBriefSchema, clampingSchema } from './banks';
import { estimateSchema, fadeViewSchema } from './cells';
import {
  checkFieldsSchema,
  checkStateSchema,
  computedSchema,
  correctableSchema,
  correctionSchema,
  messageSchema,
  severitySchema,
} from './checks';
import {
  calendarDateSchema,
  calendarMonthSchema,
  cellIdSchema,
  idSchema,
  instantSchema,
  requiredText,
  text,
} from './fields';
import { limits } from './limits';
import { logResultSchema } from './uploads';

export const findingSchema = z.object({
  rule: z.string(),
  title: z.string(),
  severity: severitySchema,
  text: z.string(),
  evidence: z.record(z.string(), z.union([z.number(), z.string()])),
});
export type Finding = z.infer<typeof findingSchema>;

export const queueQuerySchema = z.object({
  state: checkStateSchema.default('submitted'),
  severity: severitySchema.optional(),
  cellType: cellIdSchema.optional(),
  /** Checks that this rule has something to say of. */
  rule: z
    .string()
    .regex(/^[a-zA-Z]{1,40}$/)
    .optional(),
  after: z.string().max(200).optional(),
  limit: z.coerce.number().int().min(1).max(100).default(50),
});
export type QueueQuery = z.input<typeof queueQuerySchema>;

/** Doubtful first, then oldest first. The bank is known by its five characters only. */
export const queueEntrySchema = z.object({
  checkId: idSchema,
  pseudonym: z.string(),
  cellType: cellTypeBriefSchema,
  layout: z.string(),
  state: checkStateSchema,
  severity: severitySchema,
  headline: z.string(),
  submittedAt: instantSchema,
  version: z.number().int(),
  isOwn: z.boolean(),
  /** Who is at work on it just now. */
  claimedBy: z.enum(['me', 'other']).nullable(),
  /** Another moderator wants it turned away, and a second opinion is asked. */
  isProposed: z.boolean(),
});
export type QueueEntry = z.infer<typeof queueEntrySchema>;

export const queueSchema = z.object({
  entries: z.array(queueEntrySchema),
  next: z.string().nullable(),
  counts: z.partialRecord(checkStateSchema, z.number().int()),
  /** What the state's checks can be filtered by, whatever the filters; with the first page only. */
  facets: z
    .object({
      severities: z.partialRecord(severitySchema, z.number().int()),
      cellTypes: z.array(z.object({ id: cellIdSchema, name: z.string(), count: z.number().int() })),
      rules: z.array(z.object({ rule: z.string(), count: z.number().int() })),
    })
    .nullable(),
});
export type Queue = z.infer<typeof queueSchema>;

/** Where checks of banks used like this one lie, new measurement and all: 50 and 80 % of them. */
const expectedBandSchema = z.object({
  years: z.number(),
  inner: z.tuple([z.number(), z.number()]),
  outer: z.tuple([z.number(), z.number()]),
});

export const claimSchema = z.object({ by: z.enum(['me', 'other']), until: instantSchema });
export type Claim = z.infer<typeof claimSchema>;

/** Turning away or recalling a check of a bank that moves a published figure by more than this takes two moderators. */
export const largeInfluenceInSe = 0.3;

const secondOpinionSchema = z.object({
  isNeeded: z.boolean(),
  /** The figure the bank moves most, in its standard errors; null below the limit. */
  largest: z.object({ parameter: z.string(), shiftInSe: z.number() }).nullable(),
  proposal: z.object({ reason: z.string(), at: instantSchema, isMine: z.boolean() }).nullable(),
});

export const submissionSchema = z.object({
  checkId: idSchema,
  version: z.number().int(),
  state: checkStateSchema,
  isOwn: z.boolean(),
  /** It came in a file of earlier checks. */
  isFromFile: z.boolean(),
  submittedAt: instantSchema,
  bank: z.object({
    pseudonym: z.string(),
    cellType: cellTypeBriefSchema,
    parallel: z.number().int(),
    series: z.number().int(),
    ratedAh: z.number(),
    firstUseMonth: calendarMonthSchema,
    bought: boughtSchema,
    clamping: clampingSchema,
    clampForceN: z.number().nullable(),
    events: z.array(bankEventSchema),
  }),
  fields: checkFieldsSchema,
  computed: computedSchema,
  findings: z.array(findingSchema),
  log: logResultSchema.nullable(),
  /** The bank's checks in order of date, this one included. */
  history: z.array(
    z.object({
      checkId: idSchema,
      testedOn: calendarDateSchema,
      state: checkStateSchema,
      ageYears: z.number(),
      efc: z.number(),
      sohFraction: z.number(),
      expandedFraction: z.number(),
    }),
  ),
  conversation: z.array(messageSchema),
  /** The working fit's curve of this cell type: all approved checks. */
  working: fadeViewSchema,
  workingFittedAt: instantSchema.nullable(),
  /** Empty where there is no working fit, or the bank is not of the pool. */
  expected: z.array(expectedBandSchema),
  claim: claimSchema.nullable(),
  correction: correctionSchema.nullable(),
  isRealFailure: z.boolean(),
  mergedIntoId: idSchema.nullable(),
  secondOpinion: secondOpinionSchema,
  /** The reader's own last decision on it, while it can be undone. */
  undo: z.object({ decisionId: idSchema, until: instantSchema }).nullable(),
});
export type Submission = z.output<typeof submissionSchema>;

const seen = { version: z.number().int().min(1) };
const reason = requiredText(limits.noteLength.max);

export const decisionRequestSchema = z.discriminatedUnion('action', [
  z.object({ action: z.literal('approve'), ...seen }),
  z.object({
    action: z.literal('correct'),
    ...seen,
    corrections: correctableSchema.refine(
      (corrections) => Object.values(corrections).some((value) => value !== undefined),
      'Give at least one figure.',
    ),
    reason,
  }),
  /** A real failure of the bank: approved, and kept whatever the screening says. */
  z.object({ action: z.literal('realFailure'), ...seen, note: text(limits.noteLength.max).default('') }),
  z.object({ action: z.literal('sendBack'), ...seen, question: requiredText(limits.noteLength.max) }),
  z.object({ action: z.literal('turnAway'), ...seen, reason }),
  /** Takes an approved check out of the pool. */
  z.object({ action: z.literal('recall'), ...seen, reason }),
  /** The same test as another check of the bank: that one stays. */
  z.object({ action: z.literal('merge'), ...seen, intoCheckId: idSchema }),
]);
export type DecisionRequest = z.input<typeof decisionRequestSchema>;
export type DecisionAction = DecisionRequest['action'];

/** How long a decision can be undone, s; mail and refit wait for it. */
export const undoSeconds = 30;

/** `isProposed`: nothing is decided yet, another moderator has to agree. */
export const decisionResultSchema = z.object({
  state: checkStateSchema,
  version: z.number().int(),
  isProposed: z.boolean(),
  decisionId: idSchema.nullable(),
  undoUntil: instantSchema.nullable(),
});
export type DecisionResult = z.infer<typeof decisionResultSchema>;

export const claimResultSchema = z.object({ claim: claimSchema.nullable() });

/** Approves clean checks together; each stands or falls by itself. */
export const bulkApprovalRequestSchema = z.object({
  checks: z
    .array(z.object({ checkId: idSchema, ...seen }))
    .min(1, 'Choose at least one check.')
    .max(100, 'Choose at most 100 checks at once.'),
});
export const bulkApprovalSchema = z.object({
  results: z.array(
    z.object({ checkId: idSchema, decisionId: idSchema.nullable(), problem: z.string().nullable() }),
  ),
  undoUntil: instantSchema,
});
export type BulkApproval = z.infer<typeof bulkApprovalSchema>;

export const undoRequestSchema = z.object({ decisionIds: z.array(idSchema).min(1).max(100) });
export const undoResultSchema = z.object({
  results: z.array(z.object({ decisionId: idSchema, problem: z.string().nullable() })),
});

const lifeWithSchema = z.object({
  /** Years to 80 % at the standard use, of the cell type where it has enough banks, else of the pool. */
  years: estimateSchema,
  leftAtReachFraction: estimateSchema,
  status: z.enum(['measured', 'projected', 'extrapolated', 'beyond']),
  basis: z.enum(['cellType', 'pool']),
  banks: z.number().int(),
  checks: z.number().int(),
});
export type LifeWith = z.infer<typeof lifeWithSchema>;

/** What the working life would be without this check and with it, both fitted anew; and the checks nearest to it. */
export const submissionEffectSchema = z.object({
  /** Why there is no figure. */
  absence: z.enum(['notOfThePool', 'tooFewChecks', 'notConverged']).nullable(),
  without: lifeWithSchema.nullable(),
  with: lifeWithSchema.nullable(),
  /** The charge it stands with in that fit, Ah, where a slip of scale was mended first; null as it was given. */
  asAh: z.number().nullable(),
  /** The fit itself sets the check aside as an outlier, so that it moves nothing. */
  isSetAside: z.boolean(),
  neighbours: z.array(
    z.object({
      ageYears: z.number(),
      efc: z.number(),
      depthFraction: z.number(),
      temperatureC: z.number(),
      isClamped: z.boolean(),
      sohFraction: z.number(),
    }),
  ),
});
export type SubmissionEffect = z.infer<typeof submissionEffectSchema>;
