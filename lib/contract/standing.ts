import { z } from 'zod';

import { estimateSchema, lifeStatusSchema, outsideSchema, supportSchema } from './cells';
import { effectSchema, verdictSchema } from './effects';
import { instantSchema } from './fields';

/** A use as the fit takes it: conditions since new, and full cycles a year. */
export const bankUseSchema = z.object({
  depthFraction: z.number(),
  dischargeIt: z.number(),
  temperatureC: z.number(),
  socMeanFraction: z.number(),
  isClamped: z.boolean(),
  efcPerYear: z.number(),
});
export type BankUse = z.infer<typeof bankUseSchema>;

/** The shares of banks whose capacity lies below the lines of the growth chart. */
export const growthShares = [0.1, 0.25, 0.5, 0.75, 0.9] as const;

/** Capacity left of banks used alike at an age, share of the rating, one for each of `growthShares`. */
export const growthPointSchema = z.object({
  years: z.number(),
  efc: z.number(),
  quantiles: z.array(z.number()).length(growthShares.length),
  status: lifeStatusSchema,
});
export type GrowthPoint = z.infer<typeof growthPointSchema>;

/** Where a bank stands by the pace its own checks give it. */
export const paceSchema = z.object({
  /** Share of banks used alike that fade faster, with its 90 % range. */
  fasterFraction: estimateSchema,
  /** Its fade over that of the typical one. */
  ratio: estimateSchema,
});
export type Pace = z.infer<typeof paceSchema>;

/** When the bank comes down to 80 %, given its own checks, if it goes on as to date. */
export const forecastSchema = z.object({
  /** Years since first use, and full cycles since new. */
  years: estimateSchema,
  efc: estimateSchema,
  /** Calendar years; `upper` is null past what pages give (three times the reach). */
  inYear: z.object({
    estimate: z.number().int(),
    lower: z.number().int(),
    upper: z.number().int().nullable(),
  }),
  status: lifeStatusSchema,
  support: supportSchema,
  /** Probability that it is below 80 % today. */
  passedFraction: z.number(),
  /** Share of the fade at 80 % that the calendar takes; cycling takes the rest. */
  calendarFraction: estimateSchema,
});
export type Forecast = z.infer<typeof forecastSchema>;

/** One condition that can be tried at other values, within what the pool supports. */
export const whatIfLeverSchema = z.object({
  condition: z.enum(['depthFraction', 'temperatureC', 'socMeanFraction', 'dischargeIt']),
  value: z.number(),
  min: z.number(),
  max: z.number(),
  step: z.number(),
});
export type WhatIfLever = z.infer<typeof whatIfLeverSchema>;

/** A count that may be told: exact from 20, below that only between which numbers it lies. */
export const toldCountSchema = z.object({ from: z.number().int(), to: z.number().int() });
export type ToldCount = z.infer<typeof toldCountSchema>;

/** What the bank's checks added. Counts of the cell type are those of the public pool. */
export const contributionSchema = z.object({
  approved: z.number().int(),
  published: z.number().int(),
  cellType: z.object({ checks: toldCountSchema, banks: toldCountSchema }).nullable(),
});
export type Contribution = z.infer<typeof contributionSchema>;

export const standingStateSchema = z.enum(['ready', 'noCheck', 'noFit', 'outside']);
export const standingNoteSchema = z.enum([
  'boughtUsed',
  'boughtUnknown',
  'clampingUnclear',
  'checksSetAside',
]);

/** A bank among banks used like it, by the working fit; for its owner only. */
export const standingSchema = z.object({
  state: standingStateSchema,
  notes: z.array(standingNoteSchema),
  /** Conditions that the pool does not cover, where `state` is outside. */
  outside: z.array(outsideSchema),
  use: bankUseSchema.nullable(),
  /** Whose banks it is compared with: its cell type's, or any where that has too few. */
  basis: z.enum(['cellType', 'pool']).nullable(),
  /** Approved checks that it rests on. */
  checksUsed: z.number().int(),
  bands: z.array(growthPointSchema),
  pace: paceSchema.nullable(),
  forecast: forecastSchema.nullable(),
  levers: z.array(whatIfLeverSchema),
  contribution: contributionSchema,
  fittedAt: instantSchema.nullable(),
});
export type Standing = z.infer<typeof standingSchema>;

const tried = (min: number, max: number) => z.coerce.number().min(min).max(max).optional();

/** `?temperatureC=20&isClamped=true`: what is tried; the rest stays as the bank lives. */
export const whatIfQuerySchema = z.object({
  depthFraction: tried(0.05, 1),
  temperatureC: tried(-30, 70),
  socMeanFraction: tried(0, 1),
  dischargeIt: tried(0.005, 2),
  isClamped: z
    .enum(['true', 'false'])
    .transform((value) => value === 'true')
    .optional(),
});
export type WhatIf = z.input<typeof whatIfQuerySchema>;

/** What a change does to a whole life: years at the new use over years at the bank's own. */
export const whatIfAnswerSchema = z.object({
  /** Each changed condition by itself. */
  effects: z.array(effectSchema),
  /** All of them at once; null where one of them is not measured. */
  together: z
    .object({
      ratio: estimateSchema,
      verdict: verdictSchema,
      isAtLeast: z.boolean(),
      isLeaning: z.boolean(),
      priorShareFraction: z.number(),
    })
    .nullable(),
  outside: z.array(outsideSchema),
});
export type WhatIfAnswer = z.infer<typeof whatIfAnswerSchema>;
