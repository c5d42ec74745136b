import { z } from 'zod';

import { boughtSchema, clampingSchema } from './banks';
import { calendarDateSchema, calendarMonthSchema, idSchema, instantSchema } from './fields';
import { forecastSchema, paceSchema, standingSchema } from './standing';

/** A check on a health record: the month, and figures rounded more coarsely than any public row. */
const recordCheckSchema = z.object({
  month: calendarMonthSchema,
  /** Since first use, to a quarter. */
  years: z.number(),
  /** To 50. */
  efc: z.number(),
  /** To whole per cent. */
  sohFraction: z.number(),
  /** ± at 95 % of what is new at each check; rounded up to half per cents. */
  plusMinusFraction: z.number(),
  /** The whole discharge stands in a log, or its figures were typed. */
  isFromLog: z.boolean(),
  /** The fit found that it does not agree with the bank's other checks. */
  isSetAside: z.boolean(),
});

/** What a health record says, as issued. It names no owner, no bank, no pseudonym and no place. */
export const recordContentSchema = z.object({
  /** Of this form; a later one is read beside it. */
  format: z.literal(1),
  issuedOn: calendarDateSchema,
  bank: z.object({
    maker: z.string(),
    cellType: z.string(),
    parallel: z.number(),
    series: z.number(),
    ratedAh: z.number(),
    nominalV: z.number(),
    energyKwh: z.number(),
    firstUseYear: z.number().int(),
    bought: boughtSchema,
    clamping: clampingSchema,
  }),
  checks: z.array(recordCheckSchema).min(1),
  standing: standingSchema
    .pick({ state: true, notes: true, outside: true, use: true, basis: true, checksUsed: true, bands: true })
    .extend({ pace: paceSchema.nullable(), forecast: forecastSchema.nullable() }),
});
export type RecordContent = z.infer<typeof recordContentSchema>;

/** A health record as its owner lists it. */
export const healthRecordSchema = z.object({
  id: idSchema,
  issuedAt: instantSchema,
  /** The first characters of the SHA-256 over what it says; printed on it. */
  digest: z.string(),
  withdrawnAt: instantSchema.nullable(),
});
export type HealthRecord = z.infer<typeof healthRecordSchema>;

export const healthRecordListSchema = z.object({ records: z.array(healthRecordSchema) });

/** The answer to issuing one: the only time that its token is told. */
export const issuedRecordSchema = z.object({ record: healthRecordSchema, token: z.string() });

/** What anyone with the link reads. */
export const sharedRecordSchema = z.discriminatedUnion('state', [
  z.object({
    state: z.literal('inForce'),
    issuedAt: instantSchema,
    digest: z.string(),
    content: recordContentSchema,
  }),
  z.object({ state: z.literal('withdrawn') }),
]);
export type SharedRecord = z.infer<typeof sharedRecordSchema>;
