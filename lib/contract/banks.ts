import { z } from 'zod';

import {
  calendarDateSchema,
  calendarMonthSchema,
  cellIdSchema,
  fieldSourceSchema,
  idSchema,
  requiredText,
  text,
  wholeWithin,
  within,
} from './fields';
import { limits } from './limits';

export const clampingSchema = z.enum(['none', 'rigid', 'sprung'], {
  error: 'Choose how the cells are held.',
});
export const boughtSchema = z.enum(['new', 'used', 'unknown'], {
  error: 'Choose how the cells were bought.',
});
export const placeSchema = z.enum(['indoors', 'shed', 'garage', 'vehicle', 'boat']);
export const climateBandSchema = z.enum(['cold', 'cool', 'mild', 'warm', 'hot']);
export type Clamping = z.infer<typeof clampingSchema>;

export const bankSourcedFieldsSchema = z.enum([
  'startCapacityAh',
  'clampForceN',
  'clampTorqueNm',
  'spacingMm',
  'chargeLimitV',
  'dischargeLimitV',
  'bmsHighTripV',
  'bmsLowTripV',
]);

/** What an owner says of a bank. Wanted and optional fields are null when not known. */
export const bankFieldsSchema = z.object({
  name: requiredText(limits.nameLength.max),
  cellTypeId: cellIdSchema,
  parallel: wholeWithin(limits.parallel),
  series: wholeWithin(limits.series),
  firstUseMonth: calendarMonthSchema,
  madeMonth: calendarMonthSchema.nullable().default(null),
  bought: boughtSchema,
  /** Own first check, Ah of the whole bank at reference conditions. */
  startCapacityAh: within(limits.capacityAh).nullable().default(null),
  clamping: clampingSchema,
  clampForceN: within(limits.clampForceN).nullable().default(null),
  clampTorqueNm: within(limits.clampTorqueNm).nullable().default(null),
  spacingMm: within(limits.spacingMm).nullable().default(null),
  place: placeSchema.nullable().default(null),
  climateBand: climateBandSchema.nullable().default(null),
  chargeLimitV: within(limits.cellV).nullable().default(null),
  dischargeLimitV: within(limits.cellV).nullable().default(null),
  bmsHighTripV: within(limits.cellV).nullable().default(null),
  bmsLowTripV: within(limits.cellV).nullable().default(null),
  /** Price per cell in the currency's minor units. */
  priceMinor: z.number().int().min(limits.priceMinor.min).max(limits.priceMinor.max).nullable().default(null),
  priceCurrency: z
    .string()
    .regex(/^[A-Z]{3}$/, 'Use the three letters of the currency.')
    .nullable()
    .default(null),
  priceMonth: calendarMonthSchema.nullable().default(null),
  sources: z.partialRecord(bankSourcedFieldsSchema, fieldSourceSchema).default({}),
});

function checkBank(bank: z.output<typeof bankFieldsSchema>, context: z.RefinementCtx) {
  const refuse = (path: keyof typeof bank, message: string) =>
    context.addIssue({ code: 'custom', path: [path], message });
  if (bank.madeMonth && bank.madeMonth > bank.firstUseMonth)
    refuse('madeMonth', 'Made after its first use. Check both months.');
  if (bank.chargeLimitV && bank.dischargeLimitV && bank.dischargeLimitV >= bank.chargeLimitV)
    refuse('dischargeLimitV', 'The discharge limit must be below the charge limit.');
  if (bank.priceMinor !== null && bank.priceCurrency === null)
    refuse('priceCurrency', 'Say in which currency.');
  if (bank.clamping === 'none' && (bank.clampForceN !== null || bank.clampTorqueNm !== null))
    refuse('clamping', 'A force or torque is given, but the cells are said not to be clamped.');
}

export const createBankRequestSchema = bankFieldsSchema.superRefine(checkBank);
export const updateBankRequestSchema = bankFieldsSchema
  .extend({ version: z.number().int().min(1) })
  .superRefine(checkBank);
export type BankInput = z.input<typeof createBankRequestSchema>;
export type BankFields = z.output<typeof createBankRequestSchema>;
export type UpdateBankRequest = z.input<typeof updateBankRequestSchema>;

export const bankEventKindSchema = z.enum([
  'rebalanced',
  'cellReplaced',
  'cellFailed',
  'swollen',
  'meterChanged',
  'bmsChanged',
  'clampingChanged',
  'layoutChanged',
  'sold',
  'retired',
]);
export type BankEventKind = z.infer<typeof bankEventKindSchema>;

/** Events after which no check of the bank is asked for any more. */
const endingKinds: readonly string[] = ['sold', 'retired'] satisfies BankEventKind[];

const bankEventFieldsSchema = z.object({
  happenedOn: calendarDateSchema,
  kind: bankEventKindSchema,
  note: text(limits.noteLength.max).default(''),
});
export const createBankEventRequestSchema = bankEventFieldsSchema.superRefine(({ kind, note }, context) => {
  if (kind === 'retired' && note === '')
    context.addIssue({ code: 'custom', path: ['note'], message: 'Say why it was retired.' });
});
export type BankEventInput = z.input<typeof createBankEventRequestSchema>;

export const bankEventSchema = bankEventFieldsSchema.extend({ id: idSchema });
export type BankEvent = z.output<typeof bankEventSchema>;

/** The event a bank ended with, or undefined while it is in use. */
export function endingOf<Event extends { kind: string }>(events: readonly Event[]): Event | undefined {
  return events.find(({ kind }) => endingKinds.includes(kind));
}

/** The cell type as a bank carries it along. */
export const cellTypeBriefSchema = z.object({
  id: cellIdSchema,
  maker: z.string(),
  name: z.string(),
  ratedAh: z.number(),
  nominalV: z.number(),
});
export type CellTypeBrief = z.infer<typeof cellTypeBriefSchema>;

export const bankSchema = bankFieldsSchema.extend({
  id: idSchema,
  version: z.number().int(),
  cellType: cellTypeBriefSchema,
  /** Rated capacity of the whole bank, Ah. */
  ratedAh: z.number(),
  checkCount: z.number().int(),
  events: z.array(bankEventSchema),
});
export type Bank = z.output<typeof bankSchema>;

export const bankListSchema = z.object({ banks: z.array(bankSchema) });

/** A cell type a bank can be of: listed, or the owner's own proposal, which nobody else can choose. */
export const cellTypeChoiceSchema = cellTypeBriefSchema.extend({
  faceAreaMm2: z.number().nullable(),
  isProposed: z.boolean(),
});
export type CellTypeChoice = z.infer<typeof cellTypeChoiceSchema>;
export const cellTypeListSchema = z.object({ cellTypes: z.array(cellTypeChoiceSchema) });
