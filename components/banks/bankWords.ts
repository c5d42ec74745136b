import type { Bank, BankEventKind, BankFields, Clamping } from '@/lib/contract/banks';
import { formatQuantity } from '@/lib/units';

export const boughtWords: Record<BankFields['bought'], string> = {
  new: 'new',
  used: 'used',
  unknown: 'not known',
};

export const clampingWords: Record<Clamping, string> = {
  none: 'not clamped',
  rigid: 'rigid end plates',
  sprung: 'sprung end plates',
};

export const placeWords: Record<NonNullable<BankFields['place']>, string> = {
  indoors: 'indoors',
  shed: 'shed',
  garage: 'garage',
  vehicle: 'vehicle',
  boat: 'boat',
};

/** Means of the year outdoors; five bands, so that a place can not be told from one. */
export const climateBandWords: Record<NonNullable<BankFields['climateBand']>, string> = {
  cold: 'cold: year below 12 °C',
  cool: 'cool: 12 to 16 °C',
  mild: 'mild: 16 to 20 °C',
  warm: 'warm: 20 to 25 °C',
  hot: 'hot: above 25 °C',
};

export const bankEventWords: Record<BankEventKind, string> = {
  rebalanced: 'Rebalanced',
  cellReplaced: 'Cell replaced',
  cellFailed: 'Cell failed',
  swollen: 'Cell swollen',
  meterChanged: 'Meter changed',
  bmsChanged: 'BMS changed',
  clampingChanged: 'Clamping changed',
  layoutChanged: 'Layout changed',
  sold: 'Sold',
  retired: 'Retired',
};

/** A record of words as the options of a field. */
export function optionsOf<V extends string>(words: Record<V, string>): { value: V; label: string }[] {
  return (Object.entries(words) as [V, string][]).map(([value, label]) => ({ value, label }));
}

/** "1 × 16 cells": how many in parallel, how many in series. */
export function layoutLine({ parallel, series }: Pick<Bank, 'parallel' | 'series'>): string {
  return `${parallel} × ${series} ${parallel * series === 1 ? 'cell' : 'cells'}`;
}

/** "Skerry 240, 2 × 16 cells, 480 Ah" */
export function bankLine(bank: Bank): string {
  const rated = formatQuantity(bank.ratedAh, 'Ah', { decimals: 0 });
  return `${bank.cellType.name}, ${layoutLine(bank)}, ${rated}`;
}
