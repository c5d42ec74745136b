import { z } from 'zod';

import {
  curvePointSchema,
  cellPriceSchema,
  estimateSchema,
  evidenceSchema,
  lifeSchema,
  lifeStatusSchema,
  survivalSchema,
} from '@/lib/contract/cells';
import { effectSchema } from '@/lib/contract/effects';

import { publishedFitSchema } from './publishedFit';

const rangedSchema = estimateSchema;

/** A power law of fade over one group of checks, as lib/fit gives it. */
const bandCurveSchema = z.object({
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

/** Digest of each owner's rows under a key that is not their id: tells whom a later change concerns. */
const digestsSchema = z.record(z.string(), z.string());

/** Banks known to have failed, and the years over which they were counted. */
const failureCountSchema = z.object({ failures: z.number(), bankYears: z.number(), banks: z.number() });

/** What is told of one cell type's checks, whole or in one band. */
const viewSchema = z.object({
  /** How many of the dots are whose, by the keys of `owners`. */
  counts: z.record(z.string(), z.number()).default({}),
  cellType: z.string(),
  bandKey: z.string().nullable(),
  /** Null where fewer than five owners stand behind it, or others must be protected. */
  evidence: evidenceSchema.nullable(),
  /** The single curve through a band's checks; null for the whole, whose figures are the pooled model's. */
  result: z.discriminatedUnion('ok', [bandCurveSchema, refusalSchema]).nullable(),
  /** Years in tenths, EFC to 10, SOH to 0.1 %. */
  dots: z.array(z.tuple([z.number(), z.number(), z.number()])),
  owners: digestsSchema,
  /** Of the whole alone; null in a band, where nothing may be told, and in fits from before it was counted. */
  failures: failureCountSchema.nullable().default(null),
});
export type View = z.infer<typeof viewSchema>;

/** Life and curve at the standard use, as pages show them. */
const figureSchema = z.object({ life: lifeSchema, curve: z.array(curvePointSchema) });
export type StoredFigure = z.infer<typeof figureSchema>;

/** A summary of the checks in one bin of a diagnostic picture: median and the middle 80 %. */
const binSchema = z.object({
  /** Which picture, and which group of it. */
  series: z.string(),
  key: z.string(),
  from: z.number().nullable(),
  to: z.number().nullable(),
  /** Null where the bin may not be told of. */
  summary: z
    .object({
      evidence: evidenceSchema,
      median: z.number(),
      lower: z.number(),
      upper: z.number(),
      /** What the model says at the mean conditions of the bin; null where that is 0 by construction. */
      model: z.number().nullable(),
    })
    .nullable(),
  owners: digestsSchema,
});
export type Bin = z.infer<typeof binSchema>;

/** Share of banks above 80 % by age, of a cell type or (null) of all; `told` is null where it may not be. */
const survivalPartSchema = z.object({
  cellType: z.string().nullable(),
  told: survivalSchema.nullable(),
  owners: digestsSchema,
});
export type SurvivalPart = z.infer<typeof survivalPartSchema>;

/** What owners paid for a cell of one type in one currency. */
const pricePartSchema = z.object({
  cellType: z.string(),
  currency: z.string(),
  told: cellPriceSchema.nullable(),
  owners: digestsSchema,
});
export type PricePart = z.infer<typeof pricePartSchema>;

/** Share of checks inside the 50, 80 and 90 % ranges predicted from their banks' other checks. */
const coverageSchema = z.object({
  checks: z.number(),
  within: z.array(z.object({ level: z.number(), shareFraction: z.number() })),
});
export type Coverage = z.infer<typeof coverageSchema>;

/** What a fit publishes, read back through this schema. */
export const fitOutputSchema = z.object({
  pool: z.object({
    evidence: evidenceSchema,
    reachYears: z.number().nullable(),
    failures: failureCountSchema.nullable().default(null),
  }),
  model: publishedFitSchema,
  /** Of each cell type that has a figure of its own, and the pool's for all others. */
  figures: z.array(figureSchema.extend({ cellType: z.string() })),
  poolFigure: figureSchema,
  effects: z.array(effectSchema),
  views: z.array(viewSchema),
  bins: z.array(binSchema),
  /** Of public fits alone; earlier ones have neither. */
  survival: z.array(survivalPartSchema).default([]),
  prices: z.array(pricePartSchema).default([]),
  coverage: coverageSchema,
});
export type FitOutput = z.infer<typeof fitOutputSchema>;
