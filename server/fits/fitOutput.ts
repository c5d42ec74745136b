import { z } from 'zod';

import { estimateSchema, evidenceSchema, lifeStatusSchema } from '@/lib/contract/cells';

const rangedSchema = estimateSchema;

/** A power law of fade over one group of checks, as lib/fit gives it. */
const curveSchema = z.object({
  ok: z.literal(true),
  k: rangedSchema,
  z: rangedSchema,
  zBound: z.enum(['lower', 'upper']).nullable(),
  owners: z.number(),
  banks: z.number(),
  checks: z.number(),
  reach: z.object({ efc: z.number(), years: z.number() }),
  efcPerYear: z.number(),
  capacityAtReach: rangedSchema,
  efcTo80: rangedSchema,
  status: lifeStatusSchema,
  points: z.array(
    z.object({
      efc: z.number(),
      capacityFraction: z.number(),
      lower: z.number(),
      upper: z.number(),
      status: lifeStatusSchema,
    }),
  ),
  resamples: z.number(),
});

const refusalSchema = z.object({
  ok: z.literal(false),
  reason: z.enum([
    'tooFewOwners',
    'tooFewChecks',
    'tooLittleSpread',
    'noFade',
    'notConverged',
    'protectsOthers',
  ]),
});

/** What a fit says of one cell type, whole or in one band. */
const viewSchema = z.object({
  cellType: z.string(),
  bandKey: z.string().nullable(),
  /** Null where fewer than five owners stand behind it, or others must be protected. */
  evidence: evidenceSchema.nullable(),
  result: z.discriminatedUnion('ok', [curveSchema, refusalSchema]),
  /** Years in tenths, EFC to 10, SOH to 0.1 %. */
  dots: z.array(z.tuple([z.number(), z.number(), z.number()])),
  /** Digest of each owner's rows under a key that is not their id: tells whom a later change concerns. */
  owners: z.record(z.string(), z.string()),
});
export type View = z.infer<typeof viewSchema>;

/** The curves a fit stores, read back through this schema. */
export const fitOutputSchema = z.object({
  pool: z.object({ evidence: evidenceSchema, reachYears: z.number().nullable() }),
  views: z.array(viewSchema),
});
export type FitOutput = z.infer<typeof fitOutputSchema>;
