import {
  bankFormSchema,
  type BankFormValues,
  emptyBank,
  unsaid,
  valuesOfBank,
} from '@/components/banks/bankValues';
import { createBankRequestSchema } from '@/lib/contract/banks';

import { sampleBank } from '../support/checkSample';

const typed = (changes: Partial<BankFormValues> = {}): BankFormValues => ({
  ...emptyBank,
  name: 'Shed bank',
  cellTypeId: 'gannet-240',
  parallel: '2',
  series: '16',
  firstUseMonth: '2023-03',
  bought: 'new',
  clamping: 'sprung',
  ...changes,
});

const messages = (values: BankFormValues): Record<string, string> => {
  const read = bankFormSchema.safeParse(values);
  return Object.fromEntries(read.error?.issues.map(({ path, message }) => [path.join('.'), message]) ?? []);
};

it('asks for what is required, at each field, and for nothing else', () => {
  expect(messages(emptyBank)).toEqual({
    name: 'This is needed.',
    cellTypeId: 'Choose one.',
    parallel: 'This is needed.',
    series: 'This is needed.',
    firstUseMonth: 'This is needed.',
    bought: 'Choose one.',
    clamping: 'Choose one.',
  });
});

it('reads what is required with the rest left open', () => {
  const bank = bankFormSchema.parse(typed());
  expect(bank).toMatchObject({ parallel: 2, series: 16, clampForceN: null, priceMinor: null, sources: {} });
  expect(createBankRequestSchema.safeParse(bank).error).toBeUndefined();
});

it('gives back a stored bank unchanged', () => {
  const stored = sampleBank({
    clamping: 'rigid',
    clampForceN: 3450,
    place: 'shed',
    chargeLimitV: 3.45,
    priceMinor: 6150,
    priceCurrency: 'EUR',
    priceMonth: '2023-01',
    sources: { chargeLimitV: 'readOff' },
  });
  const { id, version, cellType, ratedAh, checkCount, events, ...fields } = stored;
  expect([id, version, cellType, ratedAh, checkCount, events]).toHaveLength(6);
  expect(bankFormSchema.parse(valuesOfBank(stored))).toEqual(fields);
});

it.each([
  ['EUR', '61,50', 6150],
  ['JPY', '8000', 8000],
])('reads a price in %s into its minor units', (priceCurrency, priceMinor, minor) => {
  expect(bankFormSchema.parse(typed({ priceCurrency, priceMinor })).priceMinor).toBe(minor);
});

it('asks for the currency of a price, and drops one without a price', () => {
  expect(messages(typed({ priceMinor: '61.50' }))).toEqual({ priceCurrency: 'Say in which currency.' });
  expect(bankFormSchema.parse(typed({ priceCurrency: 'EUR' })).priceCurrency).toBeNull();
});

it('sends no force of cells that are not clamped, whatever was typed before', () => {
  const values = typed({ clamping: 'none', clampForceN: 'much', sources: { ...emptyBank.sources } });
  expect(bankFormSchema.parse(values).clampForceN).toBeNull();
  expect(messages({ ...values, clamping: 'rigid' })).toEqual({ clampForceN: 'Enter a number.' });
});

it('holds limits and months against each other', () => {
  expect(messages(typed({ chargeLimitV: '3.4', dischargeLimitV: '3,5' }))).toEqual({
    dischargeLimitV: 'The discharge limit must be below the charge limit.',
  });
  expect(messages(typed({ madeMonth: '2024-01' }))).toEqual({
    madeMonth: 'Made after its first use. Check both months.',
  });
  expect(messages(typed({ parallel: '1.5' }))).toEqual({
    parallel: 'Enter a whole number from 1 to 64.',
  });
});

it('takes back a choice that is not said any more', () => {
  const bank = bankFormSchema.parse(typed({ place: unsaid.value, climateBand: 'mild' }));
  expect(bank).toMatchObject({ place: null, climateBand: 'mild' });
});
