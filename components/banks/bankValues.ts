import { z } from 'zod';

import {
  chosen,
  numberText,
  optionalNumberText,
  optionalQuantityText,
  optionalText,
  readBy,
  readThrough,
} from '@/components/forms';
import {
  type Bank,
  type BankFields,
  bankFieldsSchema,
  bankSourcedFieldsSchema,
  createBankRequestSchema,
} from '@/lib/contract/banks';
import type { FieldSource } from '@/lib/contract/fields';
import { limits } from '@/lib/contract/limits';
import { currencyDecimals, minorUnitsOf } from '@/lib/units';

type SourcedField = z.infer<typeof bankSourcedFieldsSchema>;
type TextField = Exclude<keyof BankFields, 'sources'>;

/** What is typed and chosen, as text; named as the contract names it, so that the server's remarks find their field. */
export type BankFormValues = Record<TextField, string> & {
  sources: Record<SourcedField, FieldSource | ''>;
  /** The step being filled in, where they are asked in steps. */
  step: number;
  /** Of the stored bank that these were typed over; 0 for one that is not stored yet. */
  version: number;
};

const { shape } = bankFieldsSchema;
const sourcedFields = bankSourcedFieldsSchema.options;
const noSources = Object.fromEntries(sourcedFields.map((field) => [field, ''])) as BankFormValues['sources'];

/** A form nothing has been typed into. */
export const emptyBank: BankFormValues = {
  ...(Object.fromEntries(
    Object.keys(shape)
      .filter((key) => key !== 'sources')
      .map((key) => [key, '']),
  ) as Record<TextField, string>),
  sources: noSources,
  step: 0,
  version: 0,
};

/**
 * What a new bank starts from: cells that stand alone, figures from tools metered and limits read off, and where it
 * stands as the last bank of its owner does.
 */
export function newBankValues(last: Bank | undefined): BankFormValues {
  return {
    ...emptyBank,
    parallel: '1',
    place: last?.place ?? '',
    climateBand: last?.climateBand ?? '',
    priceCurrency: last?.priceCurrency ?? '',
    sources: {
      ...noSources,
      startCapacityAh: 'metered',
      clampTorqueNm: 'metered',
      spacingMm: 'metered',
      chargeLimitV: 'readOff',
      dischargeLimitV: 'readOff',
      bmsHighTripV: 'readOff',
      bmsLowTripV: 'readOff',
    },
  };
}

/** Converted values have more digits than anybody typed. */
const digits = 7;

const text = (value: string | number | null) => {
  if (value === null) return '';
  return typeof value === 'number' ? String(Number(value.toPrecision(digits))) : value;
};

/** A stored bank as its form shows it. */
export function valuesOfBank(bank: Bank): BankFormValues {
  const fields = Object.fromEntries(
    (Object.keys(emptyBank) as (keyof BankFormValues)[])
      .filter((key): key is TextField => key !== 'sources' && key !== 'step' && key !== 'version')
      .map((key) => [key, text(bank[key])]),
  ) as Record<TextField, string>;
  const { priceMinor, priceCurrency } = bank;
  const price = priceMinor === null || priceCurrency === null ? '' : amountText(priceMinor, priceCurrency);
  return {
    ...fields,
    priceMinor: price,
    sources: { ...noSources, ...bank.sources },
    step: 0,
    version: bank.version,
  };
}

const amountText = (minor: number, currency: string) => {
  const decimals = currencyDecimals(currency);
  return (minor / 10 ** decimals).toFixed(decimals);
};

/** A choice that takes back another one. */
export const unsaid = { value: 'unsaid', label: 'Not said' } as const;

const unlessUnsaid = <Read>(schema: z.ZodType<Read, string>) =>
  z
    .string()
    .transform((value) => (value === unsaid.value ? '' : value))
    .pipe(schema);

const isCurrency = (code: string) => /^[A-Z]{3}$/.test(code);
const mostPrice = 1_000_000;

/** Reads a form into the bank that is sent; what is not clamped has no force. */
export const bankFormSchema: z.ZodType<BankFields, BankFormValues> = readThrough((typed: BankFormValues) => {
  const isClamped = typed.clamping !== 'none';
  const whenClamped = <Read>(schema: z.ZodType<Read, string>) =>
    z
      .string()
      .transform((value) => (isClamped ? value : ''))
      .pipe(schema);
  const price = z
    .number()
    .min(0, 'Enter a price of 0 or more.')
    .max(mostPrice, `Enter at most ${mostPrice}.`)
    .transform((amount) =>
      isCurrency(typed.priceCurrency) ? minorUnitsOf(amount, typed.priceCurrency) : Math.round(amount * 100),
    );
  return z
    .object({
      name: z.string().pipe(shape.name),
      cellTypeId: chosen(shape.cellTypeId),
      parallel: numberText(shape.parallel),
      series: numberText(shape.series),
      firstUseMonth: z.string().min(1, 'This is needed.').pipe(shape.firstUseMonth),
      madeMonth: optionalText(shape.firstUseMonth),
      bought: chosen(shape.bought),
      startCapacityAh: optionalQuantityText(limits.capacityAh, 'Ah'),
      clamping: chosen(shape.clamping),
      clampForceN: whenClamped(optionalQuantityText(limits.clampForceN, 'N')),
      clampTorqueNm: whenClamped(optionalQuantityText(limits.clampTorqueNm, 'N·m')),
      spacingMm: optionalQuantityText(limits.spacingMm, 'mm'),
      place: unlessUnsaid(optionalText(chosen(shape.place.unwrap().unwrap()))),
      climateBand: unlessUnsaid(optionalText(chosen(shape.climateBand.unwrap().unwrap()))),
      chargeLimitV: optionalQuantityText(limits.cellV, 'V'),
      dischargeLimitV: optionalQuantityText(limits.cellV, 'V'),
      bmsHighTripV: optionalQuantityText(limits.cellV, 'V'),
      bmsLowTripV: optionalQuantityText(limits.cellV, 'V'),
      priceMinor: optionalNumberText(price),
      priceCurrency: z
        .string()
        .transform((code) => (typed.priceMinor.trim() === '' || code === '' ? null : code)),
      priceMonth: optionalText(shape.firstUseMonth),
      sources: z.record(z.string(), z.string()).transform(() => chosenSources(typed)),
    })
    .transform(readBy(createBankRequestSchema));
});

/** Sources of fields that say something; one of an empty field means nothing. */
const chosenSources = (typed: BankFormValues): BankFields['sources'] => {
  const isSaid = (field: SourcedField) => typed.sources[field] !== '' && typed[field].trim() !== '';
  return Object.fromEntries(
    sourcedFields.filter(isSaid).map((field) => [field, typed.sources[field] as FieldSource]),
  );
};
