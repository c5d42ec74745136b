import type { BankFormValues } from './bankValues';

type Field = Exclude<keyof BankFormValues, 'sources'>;

/** Fields that are wanted or optional, in the groups the form folds them into. */
export const bankGroups = {
  start: ['madeMonth', 'startCapacityAh'],
  limits: ['chargeLimitV', 'dischargeLimitV', 'bmsHighTripV', 'bmsLowTripV'],
  clamping: ['clampForceN', 'clampTorqueNm', 'spacingMm'],
  place: ['place', 'climateBand'],
  price: ['priceMinor', 'priceCurrency', 'priceMonth'],
} as const satisfies Record<string, readonly Field[]>;

export type BankGroup = keyof typeof bankGroups;
