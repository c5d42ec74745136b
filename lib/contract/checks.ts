import { z } from 'zod';

import { consent } from './consent';
import {
  calendarDateSchema,
  fieldSourceSchema,
  idSchema,
  instantSchema,
  requiredText,
  text,
  within,
} from './fields';
import { limits } from './limits';

export const checkStateSchema = z.enum([
  'draft',
  'submitted',
  'sentBack',
  'approved',
  'turnedAway',
  'withdrawn',
  'recalled',
]);
export type CheckState = z.infer<typeof checkStateSchema>;

export const methodSchema = z.enum(['countedDischarge', 'countedCharge'], {
  error: 'Choose how the charge was counted.',
});
export const fullChargeEndSchema = z.enum(['voltageAndTail', 'bms', 'time'], {
  error: 'Choose what ended the charge.',
});
export const dischargeEndSchema = z.enum(['lowestCell', 'bankVoltage', 'bmsTrip', 'load'], {
  error: 'Choose what ended the discharge.',
});
export const counterKindSchema = z.enum(['efc', 'ah', 'kwh']);
export const temperaturePlaceSchema = z.enum(['cells', 'air']);

/** What the meter and the cells showed in the test, of the whole bank. */
export const readingSchema = z.object({
  testedOn: calendarDateSchema,
  method: methodSchema,
  instrument: requiredText(limits.nameLength.max),
  /** The meter's own gain error, as stated (limit of error), 0.01 = 1 %. */
  gainErrorFraction: within(limits.gainErrorFraction),
  readingNoiseFraction: within(limits.readingNoiseFraction),
  capacityAh: within(limits.capacityAh),
  energyWh: within(limits.energyWh),
  meanCurrentA: within(limits.meanCurrentA),
  durationS: within(limits.durationS),
  temperatureStartC: within(limits.temperatureC),
  temperatureEndC: within(limits.temperatureC),
  fullChargeEndedBy: fullChargeEndSchema,
  restMinutes: within(limits.restMinutes).nullable().default(null),
  dischargeEndedBy: dischargeEndSchema,
  endedByCell: text(40).nullable().default(null),
  lowestCellAtFullV: within(limits.cellV).nullable().default(null),
  highestCellAtFullV: within(limits.cellV),
  lowestCellAtEndV: within(limits.cellV),
  highestCellAtEndV: within(limits.cellV).nullable().default(null),
});

/** How the bank lived since its previous check (since new, for a first one). */
export const conditionsSchema = z.object({
  depthFraction: within(limits.depthFraction),
  dischargeIt: within(limits.rateIt),
  chargeIt: within(limits.rateIt).nullable().default(null),
  peakIt: within(limits.peakIt).nullable().default(null),
  temperatureMeanC: within(limits.temperatureC),
  temperatureHottestC: within(limits.temperatureC).nullable().default(null),
  temperatureColdestC: within(limits.temperatureC).nullable().default(null),
  temperatureOf: temperaturePlaceSchema.default('cells'),
  coldestChargingC: within(limits.temperatureC).nullable().default(null),
  /** Mean state of charge; given itself, or as the daily window. */
  socMeanFraction: within(limits.socFraction).nullable().default(null),
  socLowFraction: within(limits.socFraction).nullable().default(null),
  socHighFraction: within(limits.socFraction).nullable().default(null),
  /** A counter since new: full cycles, Ah or kWh discharged. */
  counterKind: counterKindSchema.nullable().default(null),
  counterValue: z
    .number({ error: 'Enter a number.' })
    .min(0, 'Enter a number from 0.')
    .max(100_000_000)
    .nullable()
    .default(null),
  cyclesPerDay: within(limits.cyclesPerDay).nullable().default(null),
  idleDays: within(limits.idleDays).nullable().default(null),
  idleSocFraction: within(limits.socFraction).nullable().default(null),
});

export const checkSourcedFieldsSchema = z.enum([
  ...readingSchema.keyof().options,
  ...conditionsSchema.keyof().options,
]);

export const checkFieldsSchema = z.object({
  reading: readingSchema,
  conditions: conditionsSchema,
  /** The log behind the reading, when there is one. */
  uploadId: idSchema.nullable().default(null),
  /** The photo of the meter, when there is one. */
  photoId: idSchema.nullable().default(null),
  sources: z.partialRecord(checkSourcedFieldsSchema, fieldSourceSchema).default({}),
  note: text(limits.noteLength.max).default(''),
});

function checkReading(reading: z.output<typeof readingSchema>, context: z.RefinementCtx) {
  const refuse = (path: keyof typeof reading, message: string) =>
    context.addIssue({ code: 'custom', path: [path], message });
  if (reading.lowestCellAtFullV !== null && reading.lowestCellAtFullV > reading.highestCellAtFullV)
    refuse('lowestCellAtFullV', 'The lowest cell cannot be above the highest.');
  if (reading.highestCellAtEndV !== null && reading.highestCellAtEndV < reading.lowestCellAtEndV)
    refuse('highestCellAtEndV', 'The highest cell cannot be below the lowest.');
}

function checkConditions(conditions: z.output<typeof conditionsSchema>, context: z.RefinementCtx) {
  const refuse = (path: keyof typeof conditions, message: string) =>
    context.addIssue({ code: 'custom', path: [path], message });
  const hasWindow = conditions.socLowFraction !== null && conditions.socHighFraction !== null;
  if (conditions.socMeanFraction === null && !hasWindow)
    refuse('socMeanFraction', 'Give the mean state of charge, or the daily window from low to high.');
  if (hasWindow && conditions.socLowFraction! >= conditions.socHighFraction!)
    refuse('socLowFraction', 'The low end must be below the high end.');
  if ((conditions.counterKind === null) !== (conditions.counterValue === null))
    refuse('counterValue', 'Give the counter and its unit together.');
  if (conditions.counterValue === null && conditions.cyclesPerDay === null)
    refuse('counterValue', 'Give a counter since new, or the cycles a day.');
  if (conditions.counterKind === 'efc' && (conditions.counterValue ?? 0) > limits.efc.max)
    refuse('counterValue', `Enter at most ${limits.efc.max} full cycles.`);
  const { temperatureColdestC, temperatureHottestC, temperatureMeanC } = conditions;
  if (temperatureHottestC !== null && temperatureHottestC < temperatureMeanC)
    refuse('temperatureHottestC', 'The hottest month cannot be below the mean.');
  if (temperatureColdestC !== null && temperatureColdestC > temperatureMeanC)
    refuse('temperatureColdestC', 'The coldest month cannot be above the mean.');
}

/** A reading and conditions as they are sent in: each is held together in itself, so that a form can do so step by step. */
export const enteredReadingSchema = readingSchema.superRefine(checkReading);
export const enteredConditionsSchema = conditionsSchema.superRefine(checkConditions);
/** A check as it is sent in, whichever way. */
export const enteredFieldsSchema = checkFieldsSchema.extend({
  reading: enteredReadingSchema,
  conditions: enteredConditionsSchema,
});

/**
 * `idempotencyKey` is drawn by the client once per draft: sending twice stores one check. `consent` is the version of the
 * data licence the owner was shown and agreed to.
 */
export const submitCheckRequestSchema = enteredFieldsSchema.extend({
  idempotencyKey: idSchema,
  consent: z.literal(consent.version, {
    error: 'The data licence has changed. Reload the page, read it and send again.',
  }),
});
export type CheckInput = z.input<typeof submitCheckRequestSchema>;
export type CheckFields = z.output<typeof checkFieldsSchema>;

export const resubmitCheckRequestSchema = enteredFieldsSchema.extend({
  version: z.number().int().min(1),
  answer: text(limits.noteLength.max).default(''),
});
export type ResubmitCheckRequest = z.input<typeof resubmitCheckRequestSchema>;

export const answerRequestSchema = z.object({
  version: z.number().int().min(1),
  answer: requiredText(limits.noteLength.max),
});
export const withdrawRequestSchema = z.object({ version: z.number().int().min(1) });

/** One part of the uncertainty budget: relative standard uncertainty and its share of the variance of its half. */
export const budgetPartSchema = z.object({
  name: z.string(),
  relSd: z.number(),
  varianceShare: z.number(),
});

/** Calculations 2 and 3 of a check, as stored. Capacities in Ah of the whole bank. */
export const computedSchema = z.object({
  ageYears: z.number(),
  capacityRefAh: z.number(),
  sohFraction: z.number(),
  isCorrected: z.boolean(),
  meanIt: z.number(),
  meanTemperatureC: z.number(),
  meanCellV: z.number(),
  relSdMeter: z.number(),
  relSdNew: z.number(),
  expandedAh: z.number(),
  budget: z.object({ sameEachCheck: z.array(budgetPartSchema), newEachCheck: z.array(budgetPartSchema) }),
  efc: z.number(),
  efcFromCounter: z.number().nullable(),
  efcFromDepth: z.number().nullable(),
  efcDisagreement: z.number().nullable(),
});
export type Computed = z.infer<typeof computedSchema>;

export const severitySchema = z.enum(['fits', 'look', 'doubtful', 'repairable']);
export type Severity = z.infer<typeof severitySchema>;

/** A remark of the screening. The owner reads `ownerText`; moderators also the other. */
export const ownerFindingSchema = z.object({
  rule: z.string(),
  title: z.string(),
  severity: severitySchema,
  text: z.string(),
});

/** One step of a check's history as its owner sees it. */
export const messageSchema = z.object({
  at: instantSchema,
  by: z.enum(['owner', 'moderator', 'system']),
  action: z.string(),
  text: z.string(),
});
export type Message = z.infer<typeof messageSchema>;

/** Figures of a reading that a moderator may put right. */
export const correctableSchema = readingSchema
  .pick({
    capacityAh: true,
    energyWh: true,
    meanCurrentA: true,
    durationS: true,
    temperatureStartC: true,
    temperatureEndC: true,
  })
  .partial();
export type Correctable = z.infer<typeof correctableSchema>;

/** A correction as stored: the owner's own figures stay beside it, and the owner may object. */
export const correctionSchema = z.object({
  before: correctableSchema,
  after: correctableSchema,
  reason: z.string(),
  correctedAt: instantSchema,
});
export type Correction = z.infer<typeof correctionSchema>;

/** Takes a correction back: the check stands in the queue again, as its owner gave it. */
export const objectionRequestSchema = z.object({
  version: z.number().int().min(1),
  reason: requiredText(limits.noteLength.max),
});

export const checkSchema = checkFieldsSchema.extend({
  id: idSchema,
  bankId: idSchema,
  state: checkStateSchema,
  version: z.number().int(),
  submittedAt: instantSchema,
  computed: computedSchema,
  findings: z.array(ownerFindingSchema),
  history: z.array(messageSchema),
  /** Null where the reading is the owner's own; absent where it was not asked for. */
  correction: correctionSchema.nullable().optional(),
});
export type Check = z.output<typeof checkSchema>;

export const checkListSchema = z.object({ checks: z.array(checkSchema) });
