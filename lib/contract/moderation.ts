import { z } from 'zod';

import { bankEventSchema, boughtSchema, cellTypeBriefSchema, clampingSchema } from './banks';
import { fadeViewSchema } from './cells';
import { checkFieldsSchema, checkStateSchema, computedSchema, messageSchema, severitySchema } from './checks';
import { calendarDateSchema, calendarMonthSchema, idSchema, instantSchema, requiredText } from './fields';
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
});
export type QueueEntry = z.infer<typeof queueEntrySchema>;

export const queueSchema = z.object({
  entries: z.array(queueEntrySchema),
  next: z.string().nullable(),
  counts: z.partialRecord(checkStateSchema, z.number().int()),
});
export type Queue = z.infer<typeof queueSchema>;

export const submissionSchema = z.object({
  checkId: idSchema,
  version: z.number().int(),
  state: checkStateSchema,
  isOwn: z.boolean(),
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
});
export type Submission = z.output<typeof submissionSchema>;

export const decisionRequestSchema = z.discriminatedUnion('action', [
  z.object({ action: z.literal('approve'), version: z.number().int().min(1) }),
  z.object({
    action: z.literal('sendBack'),
    version: z.number().int().min(1),
    question: requiredText(limits.noteLength.max),
  }),
  z.object({
    action: z.literal('turnAway'),
    version: z.number().int().min(1),
    reason: requiredText(limits.noteLength.max),
  }),
]);
export type DecisionRequest = z.input<typeof decisionRequestSchema>;

export const decisionResultSchema = z.object({ state: checkStateSchema, version: z.number().int() });
