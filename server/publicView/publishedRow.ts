import type { PoolCheck } from '@/lib/fit/poolCheck';

import { otherCellType } from './identity';
import type { Protections } from './protections';

/** Decimals and steps to which a row's values are published, in the row's units. */
export const rowSteps = {
  ageYears: { step: 0.1, decimals: 1 },
  efc: { step: 10, decimals: 0 },
  depthFraction: { step: 0.05, decimals: 2 },
  dischargeIt: { step: 0.01, decimals: 2 },
  temperatureC: { step: 1, decimals: 0 },
  socMeanFraction: { step: 0.05, decimals: 2 },
  capacityAh: { step: 0.1, decimals: 1 },
  relSd: { step: 0.001, decimals: 3 },
} as const satisfies Partial<Record<keyof PoolCheck, { step: number; decimals: number }>>;
export type RoundedField = keyof typeof rowSteps;

/** Smallest published value of fields that a fit wants above zero. */
const least: Partial<Record<RoundedField, number>> = {
  ageYears: 0.1,
  depthFraction: 0.05,
  dischargeIt: 0.01,
  relSd: 0.001,
};

/** Capacities are published per 100 Ah of rating: what a bank is rated for tells its layout and its cell type. */
export const publishedRatedAh = 100;

/** A row as it is published: values rounded, capacity per 100 Ah. Bank and owner stay, for counting; they are no part of it. */
export function publishedRow(row: PoolCheck, cellType: string, { isRounded }: Protections): PoolCheck {
  const scaled: PoolCheck = {
    ...row,
    cellType,
    capacityAh: (row.capacityAh / row.ratedAh) * publishedRatedAh,
    ratedAh: publishedRatedAh,
    temperatureSource: row.temperatureSource ?? 'metered',
    socSource: row.socSource ?? 'metered',
    isClampingUnclear: false,
    isKept: row.isKept ?? false,
    hasFailed: row.hasFailed ?? false,
  };
  if (!isRounded) return scaled;
  for (const field of Object.keys(rowSteps) as RoundedField[])
    scaled[field] = roundField(field, scaled[field]);
  return scaled;
}

/** The very number that its printed digits say. */
function roundField(field: RoundedField, value: number): number {
  const { step, decimals } = rowSteps[field];
  return Number(Math.max(Math.round(value / step) * step, least[field] ?? 0).toFixed(decimals));
}

const told = [
  'cellType',
  'isClamped',
  ...(Object.keys(rowSteps) as RoundedField[]),
  'temperatureSource',
  'socSource',
  'isKept',
  'hasFailed',
] as const;

/** What a published row says, as one line: rows of the same line can't be told apart. */
export const rowLine = (row: PoolCheck): string => told.map((field) => String(row[field])).join(',');

/** Whether the cell type of a published row is named. */
export const isNamed = ({ cellType }: Pick<PoolCheck, 'cellType'>): boolean => cellType !== otherCellType;
