import { z } from 'zod';

import { emailSchema, presentPasswordSchema, roleSchema } from './accounts';
import { checkStateSchema } from './checks';
import { calendarDateSchema, idSchema, instantSchema, requiredText } from './fields';
import { fitKindSchema } from './fits';

/** An account as the steward sees it. */
export const personSchema = z.object({
  id: idSchema,
  /** Null where the account was found by its number and is an owner's: that tells the steward no address. */
  email: z.string().nullable(),
  role: roleSchema,
  isConfirmed: z.boolean(),
  lockedAt: instantSchema.nullable(),
  hasSecondFactor: z.boolean(),
  since: instantSchema,
});
export type Person = z.infer<typeof personSchema>;

/** Moderators and stewards by role and address, and whoever is locked. */
export const peopleSchema = z.object({ staff: z.array(personSchema), locked: z.array(personSchema) });

export const findPersonRequestSchema = z.object({
  /** An e-mail address, or the number of an account as the trail has it. */
  who: requiredText(254),
});
export type FindPersonRequest = z.input<typeof findPersonRequestSchema>;

export const foundPersonSchema = z.object({ person: personSchema.nullable() });

export const appointedRoleSchema = z.enum(['moderator', 'steward'], { error: 'Choose a role.' });
export type AppointedRole = z.infer<typeof appointedRoleSchema>;

export const appointRequestSchema = z.object({
  email: emailSchema,
  role: appointedRoleSchema,
  currentPassword: presentPasswordSchema,
});
export type AppointRequest = z.input<typeof appointRequestSchema>;

/** For taking a role away, locking, unlocking and clearing a second factor; the trail keeps the reason. */
export const changePersonRequestSchema = z.object({
  reason: requiredText(500),
  currentPassword: presentPasswordSchema,
});
export type ChangePersonRequest = z.input<typeof changePersonRequestSchema>;

export const personParamsSchema = z.object({ userId: idSchema });
export const jobParamsSchema = z.object({ jobId: idSchema });
export const mailParamsSchema = z.object({ mailId: idSchema });

const shareSchema = z.object({
  days: z.number().int(),
  decided: z.number().int(),
  /** Of the decided; null when there are none. */
  approvedFraction: z.number().nullable(),
});

const runSchema = z.object({
  kind: fitKindSchema,
  fittedAt: instantSchema,
  durationMs: z.number(),
  isGood: z.boolean(),
  reason: z.string().nullable(),
  /** Made by the code that runs now. */
  isOfThisCode: z.boolean(),
});

/** How the exchange stands. */
export const healthSchema = z.object({
  queue: z.object({
    counts: z.partialRecord(checkStateSchema, z.number().int()),
    oldestSubmittedAt: instantSchema.nullable(),
    /** From the submission to the decision, of those decided in the last 90 days. */
    medianDecisionHours: z.number().nullable(),
    shares: z.array(shareSchema),
  }),
  fits: z.object({
    last: z.array(runSchema),
    failedLately: z.array(runSchema),
    isRunning: z.boolean(),
  }),
  jobs: z.object({
    waiting: z.number().int(),
    failedCount: z.number().int(),
    failed: z.array(
      z.object({
        id: idSchema,
        kind: z.string(),
        attempts: z.number().int(),
        error: z.string(),
        failedAt: instantSchema,
      }),
    ),
  }),
  mails: z.object({
    undeliveredCount: z.number().int(),
    undelivered: z.array(
      z.object({
        id: idSchema,
        subject: z.string(),
        state: z.enum(['queued', 'failed']),
        problem: z.string().nullable(),
        createdAt: instantSchema,
      }),
    ),
  }),
  storage: z.object({
    diskFreeBytes: z.number(),
    diskBytes: z.number(),
    databaseBytes: z.number(),
    uploads: z.number().int(),
    uploadBytes: z.number(),
  }),
  /** Null: none yet. */
  lastBackup: z.object({ at: instantSchema, bytes: z.number().nullable() }).nullable(),
  trail: z.object({
    entries: z.number().int(),
    isChecking: z.boolean(),
    lastCheck: z
      .object({
        at: instantSchema,
        entries: z.number().int(),
        problems: z.array(z.object({ id: z.number().int(), problem: z.string() })),
        durationMs: z.number(),
      })
      .nullable(),
  }),
  program: z.object({ version: z.string(), revision: z.string().nullable(), startedAt: instantSchema }),
});
export type Health = z.infer<typeof healthSchema>;

/** What the entries of the trail are about: every kind of record that one can be appended for. */
export const trailKindSchema = z.enum(['check', 'bank', 'account', 'cellType', 'pool', 'release']);
export type TrailKind = z.infer<typeof trailKindSchema>;

export const trailQuerySchema = z.object({
  kind: trailKindSchema.optional(),
  /** Number of a check, bank, account, cell type, step or release. */
  record: requiredText(80).optional(),
  /** Days, UTC, both included. */
  from: calendarDateSchema.optional(),
  to: calendarDateSchema.optional(),
  /** Entries before this one. */
  before: z.coerce.number().int().min(1).optional(),
  limit: z.coerce.number().int().min(1).max(200).default(50),
});

export const trailEntrySchema = z.object({
  id: z.number().int(),
  at: instantSchema,
  actorRole: z.enum(['owner', 'moderator', 'steward', 'system']),
  actorId: z.string().nullable(),
  kind: z.string(),
  record: z.string(),
  action: z.string(),
  /** As JSON text. */
  details: z.string(),
  /** Words of a person behind it; null once they are erased. */
  texts: z.array(z.object({ field: z.string(), text: z.string().nullable() })),
});
export type TrailEntry = z.infer<typeof trailEntrySchema>;

/** Newest first; `next` goes into `before`. */
export const trailPageSchema = z.object({
  entries: z.array(trailEntrySchema),
  next: z.number().int().nullable(),
});

export const recallAtOnceRequestSchema = z.object({
  version: z.number().int().min(1),
  reason: requiredText(1000),
});
export type RecallAtOnceRequest = z.input<typeof recallAtOnceRequestSchema>;

export const recallAtOnceSchema = z.object({ wasPublic: z.boolean() });
