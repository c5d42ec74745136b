import type { FieldPath } from 'react-hook-form';

import type { BankFormValues } from './bankValues';

interface BankStep {
  title: string;
  /** What the button that leads here says after "Next: ", and the one back after "Back to ". */
  next: string;
  /** What the step is about, in a sentence. */
  lead: string;
  /** What has to be right before the next step is shown. */
  fields: readonly FieldPath<BankFormValues>[];
}

/** A bank in short steps, in the order they are asked. */
export const bankSteps: readonly BankStep[] = [
  {
    title: 'Which cells',
    next: 'which cells',
    lead: 'A bank is one installation of cells of one type, with one history.',
    fields: ['cellTypeId', 'madeMonth'],
  },
  {
    title: 'How they are wired',
    next: 'how they are wired',
    lead: 'How many cells, and since when they have been in use together.',
    fields: ['name', 'parallel', 'series', 'firstUseMonth'],
  },
  {
    title: 'Clamping and spacing',
    next: 'clamping and spacing',
    lead: 'Whether clamping helps is one of the questions the pool answers. What you do not know can stay empty.',
    fields: ['clamping', 'clampForceN', 'clampTorqueNm', 'spacingMm'],
  },
  {
    title: 'Where and within which limits',
    next: 'where and within which limits',
    lead: 'A kind of place and a band of climate, no address and no region. Limits as they are set now.',
    fields: ['place', 'climateBand', 'chargeLimitV', 'dischargeLimitV', 'bmsHighTripV', 'bmsLowTripV'],
  },
  {
    title: 'Start and purchase',
    next: 'start and purchase',
    lead: 'What the cells were when the bank began. Only how they were bought is needed.',
    fields: ['bought', 'startCapacityAh', 'priceMinor', 'priceCurrency', 'priceMonth'],
  },
  {
    title: 'Look over',
    next: 'look over',
    lead: 'Nothing is sent until you say so, and all of it can be changed later.',
    fields: [],
  },
];

export const lastBankStep = bankSteps.length - 1;

/** The first step that one of some fields stands on; the last one for fields of none. */
export function bankStepOf(paths: readonly string[]): number {
  const found = bankSteps.findIndex(({ fields }) => fields.some((field) => paths.includes(field)));
  return found < 0 ? lastBankStep : found;
}
