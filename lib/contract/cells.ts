import { z } from 'zod';

import { cellTypeBriefSchema } from './banks';
import { countSchema, toldEvidenceSchema } from './counts';
import { effectSchema } from './effects';
import { cellIdSchema, instantSchema } from './fields';
import { publicModelSchema } from './model';

/** Where a figure stands to the readings: within reach, to 2x, to 3x, past that no figure is given. */
export const lifeStatusSchema = z.enum(['measured', 'projected', 'extrapolated', 'beyond']);

/** An estimate with its 90 % range. */
export const estimateSchema = z.object({ estimate: z.number(), lower: z.number(), upper: z.number() });
export type Estimate = z.infer<typeof estimateSchema>;

export const formatSchema = z.enum(['prismatic', 'cylindrical', 'pouch']);

/** How many stand behind a figure. Given only where at least five owners do. */
export const evidenceSchema = z.object({
  owners: z.number().int(),
  banks: z.number().int(),
  checks: z.number().int(),
});
export type Evidence = z.infer<typeof evidenceSchema>;

/**
 * Banks known to have failed per 100 bank-years, with the exact 90 % range of the count. Given only where at least five
 * owners stand behind it.
 */
export const failureRateSchema = z.object({
  failures: z.number().int(),
  bankYears: z.number(),
  banks: countSchema,
  per100BankYears: estimateSchema,
});
export type FailureRate = z.infer<typeof failureRateSchema>;

/** How far a figure rests on the pool: `leans` on published studies (25-50 %), `notMeasured` (over 50 %). */
export const supportSchema = z.enum(['shown', 'leans', 'notMeasured']);

/** A condition of the use that the pool does not cover, and the nearest value that it does. */
export const outsideSchema = z.object({
  condition: z.enum([
    'depthFraction',
    'dischargeIt',
    'temperatureC',
    'socMeanFraction',
    'efcPerYear',
    'isClamped',
  ]),
  value: z.union([z.number(), z.boolean()]),
  nearest: z.union([z.number(), z.boolean()]),
});
export type Outside = z.infer<typeof outsideSchema>;

const spanSchema = z.object({ lower: z.number(), upper: z.number() });

/**
 * A life at a use: capacity left at reach first (measured), then years and EFC to 80 %. Numbers are always given with
 * their status; whether a page prints them is decided by `status`, `support` and `outside`.
 */
export const lifeSchema = z.object({
  status: lifeStatusSchema,
  years: estimateSchema,
  efc: estimateSchema,
  /** Years and EFC within which 8 of 10 banks reach 80 %; null for the single curve of a band. */
  rangeOfBanks: spanSchema.nullable(),
  rangeOfBanksEfc: spanSchema.nullable(),
  leftAtReachFraction: estimateSchema,
  reachYears: z.number(),
  reachEfc: z.number(),
  /**
   * Whose figure it is: the cell type's own, the pool's in place of one with fewer than 10 banks or 5 owners, or a
   * single curve through the checks of one band.
   */
  basis: z.enum(['cellType', 'pool', 'band']),
  /** Share that comes from published studies, 0..1; null for the single curve of a band. */
  priorShareFraction: z.number().nullable(),
  support: supportSchema,
  /** How much of the figure is the cell type's own, 0..1: 1 - se(m)² / sm²; null where none is. */
  ownShareFraction: z.number().nullable(),
  outside: z.array(outsideSchema),
});
export type Life = z.infer<typeof lifeSchema>;

export const curvePointSchema = z.object({
  efc: z.number(),
  years: z.number(),
  sohFraction: z.number(),
  lower: z.number(),
  upper: z.number(),
  status: lifeStatusSchema,
});
export type CurvePoint = z.infer<typeof curvePointSchema>;

/** Why a figure is not shown. */
export const absenceSchema = z.enum(['tooFewOwners', 'tooFewChecks', 'notConverged', 'noFit']);
export type Absence = z.infer<typeof absenceSchema>;

/** The public pool as a whole. `waiting`: approved changes held back until they concern five owners. */
export const poolSummarySchema = z.object({
  evidence: toldEvidenceSchema.nullable(),
  reachYears: z.number().nullable(),
  fittedAt: instantSchema.nullable(),
  waiting: z.enum(['none', 'fewerThanFiveOwners', 'due']),
});
export type PoolSummary = z.infer<typeof poolSummarySchema>;

/** A use: how a bank is cycled and kept. */
export const useSchema = z.object({
  depthFraction: z.number(),
  dischargeIt: z.number(),
  temperatureC: z.number(),
  socMeanFraction: z.number(),
  isClamped: z.boolean(),
  cyclesPerDay: z.number(),
});
export type Use = z.infer<typeof useSchema>;

/** The use every list entry is stated at. */
export const standardUse: Use = {
  depthFraction: 0.6,
  dischargeIt: 0.1,
  temperatureC: 25,
  socMeanFraction: 0.5,
  isClamped: false,
  cyclesPerDay: 1,
};

/** What a claim implies at the use, by one multiplier on the pool's own fade that makes it meet the claim. */
export const labelSchema = z.object({
  impliedYears: estimateSchema,
  impliedEfc: estimateSchema,
  /** Measured life / implied life; null where the pool does not reach the use, or measures too little yet. */
  ratio: estimateSchema.nullable(),
});
export type Label = z.infer<typeof labelSchema>;

/** A data-sheet claim with the conditions it was stated under; null = conditions not stated. */
export const claimSchema = z.object({
  id: z.string(),
  cycles: z.number(),
  endOfLifeFraction: z.number(),
  depthFraction: z.number().nullable(),
  chargeIt: z.number().nullable(),
  dischargeIt: z.number().nullable(),
  temperatureC: z.number().nullable(),
  clamping: z.enum(['clamped', 'none', 'notStated']),
  clampForceN: z.number().nullable(),
  whereItStands: z.string(),
  /** Cycles times depth, EFC; null where the depth is not stated. */
  efc: z.number().nullable(),
  /** At the use of the answer; null with the reason beside it. */
  label: labelSchema.nullable(),
  labelAbsence: z.enum(['conditionsNotStated', 'cannotBeMet', 'noFit']).nullable(),
});
export type Claim = z.infer<typeof claimSchema>;

/** What owners paid for a cell: the median of their prices, to two digits. Given only where at least five gave one. */
export const cellPriceSchema = z.object({ currency: z.string(), perCellMinor: z.number().int() });
export type CellPrice = z.infer<typeof cellPriceSchema>;

export const cellEntrySchema = z.object({
  cellType: cellTypeBriefSchema.extend({ format: formatSchema }),
  price: cellPriceSchema.nullable(),
  evidence: toldEvidenceSchema.nullable(),
  life: lifeSchema.nullable(),
  absence: absenceSchema.nullable(),
  claims: z.array(claimSchema),
});
export type CellEntry = z.infer<typeof cellEntrySchema>;

export const cellListSchema = z.object({
  pool: poolSummarySchema,
  use: useSchema,
  cells: z.array(cellEntrySchema),
  /** To compute lives at another use; null before the first fit. */
  model: publicModelSchema.nullable(),
});
export type CellList = z.infer<typeof cellListSchema>;

export const bandKindSchema = z.enum(['depth', 'rate', 'temperature', 'clamping']);
export type BandKind = z.infer<typeof bandKindSchema>;

/** One choice of the band filter; greyed where fewer than five owners stand behind it. */
export const bandSchema = z.object({
  key: z.string(),
  kind: bandKindSchema,
  label: z.string(),
  hasEnoughOwners: z.boolean(),
});
export type Band = z.infer<typeof bandSchema>;

/** `?band=depth:deep`, one at a time. */
export const cellQuerySchema = z.object({
  band: z
    .string()
    .regex(/^(depth|rate|temperature|clamping):[a-zA-Z]+$/, 'Choose one of the bands offered.')
    .optional(),
});

/** A check on the public chart: rounded, age in tenths of a year. */
export const dotSchema = z.object({ years: z.number(), efc: z.number(), sohFraction: z.number() });

export const fadeViewSchema = z.object({
  evidence: toldEvidenceSchema.nullable(),
  life: lifeSchema.nullable(),
  absence: absenceSchema.nullable(),
  curve: z.array(curvePointSchema),
  dots: z.array(dotSchema),
});
export type FadeView = z.infer<typeof fadeViewSchema>;

/** Checks of one stretch of age or full cycles: median and middle 80 %, from at least five owners. */
export const fadeBinSchema = z.object({
  from: z.number(),
  to: z.number(),
  median: z.number(),
  lower: z.number(),
  upper: z.number(),
});
export type FadeBin = z.infer<typeof fadeBinSchema>;

/** Share of banks still above 80 % at an age, with its 90 % range; where inside two values it is can't be told. */
export const survivalPointSchema = z.object({
  years: z.number(),
  /** The estimate's value just before and after the stretch the age lies in (Turnbull). */
  lowestFraction: z.number(),
  highestFraction: z.number(),
  lowerFraction: z.number(),
  upperFraction: z.number(),
  /** The smooth curve's value there (Weibull); null where fewer than five owners' banks have crossed. */
  smoothFraction: z.number().nullable(),
});

export const survivalSchema = z.object({
  points: z.array(survivalPointSchema),
  /** Whether fewer than five owners' banks have fallen below 80 % so far. */
  hasFewCrossings: z.boolean(),
});
export type Survival = z.infer<typeof survivalSchema>;

export const cellPageSchema = z.object({
  /** The name that was asked for, where that cell type was merged into this one. */
  movedFrom: cellIdSchema.nullable(),
  pool: poolSummarySchema,
  use: useSchema,
  cellType: cellTypeBriefSchema.extend({
    format: formatSchema,
    faceAreaMm2: z.number().nullable(),
    massKg: z.number().nullable(),
  }),
  claims: z.array(claimSchema),
  bands: z.array(bandSchema),
  band: z.string().nullable(),
  view: fadeViewSchema,
  /** What moves a life, over the whole pool. */
  effects: z.array(effectSchema),
  /** Beside fade: of this cell type, and over the whole pool. */
  failures: z.object({ cellType: failureRateSchema.nullable(), pool: failureRateSchema.nullable() }),
  /** To compute life and curve at another use: with this cell type's effect and those of the related ones. */
  model: publicModelSchema.nullable(),
  price: cellPriceSchema.nullable(),
  /** Of the whole cell type, not of a band. */
  bins: z.object({ years: z.array(fadeBinSchema), efc: z.array(fadeBinSchema) }),
  /** Null where fewer than five owners stand behind it. */
  survival: survivalSchema.nullable(),
  /** The same over all cell types. */
  poolSurvival: survivalSchema.nullable(),
  /** Cell types of the same form, nearest in capacity first. */
  related: z.array(cellTypeBriefSchema),
});
export type CellPage = z.infer<typeof cellPageSchema>;

export const cellParamsSchema = z.object({ cellId: cellIdSchema });
