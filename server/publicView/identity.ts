import type { BankFields } from '@/lib/contract/banks';

/** The fields by which somebody who knows a bank could look for it. */
export interface BankIdentity {
  cellType: string;
  commissionedYear: number;
  climateBand: BankFields['climateBand'];
  layoutClass: LayoutClass;
  /** `changed`: not the same over the bank's life. */
  clamping: BankFields['clamping'] | 'changed';
}

/** Cells in series up to 4, 8, 16 or more; alone or several in parallel. */
export type LayoutClass = `${'4' | '8' | '16' | 'more'}s ${'single' | 'parallel'}`;

/** The same as published: generalised as far as the bank's level says. */
export interface PublishedIdentity {
  cellType: string;
  commissioned: string;
  climateBand: string;
  layoutClass: string;
  clamping: string;
}

/** A cell type too rare to be named, and a field too telling to be told. */
export const otherCellType = 'other';
export const anyValue = 'any';
const unknownValue = 'unknown';

const yearsPerBand = 3;

/**
 * What each level leaves out, one after the other in this order, so that a class of one level is always made of whole
 * classes of the level before: two releases that tell a bank at two levels tell no more than the finer of them.
 */
export const levelNames = [
  'as it is',
  'clamping without its kind',
  `years in bands of ${yearsPerBand}`,
  'no climate',
  'no layout',
  'no year',
  'no cell type',
] as const;
export const coarsestLevel = levelNames.length - 1;
/** The last level that names the cell type. */
export const namedLevel = coarsestLevel - 1;

/** A bank's identifying fields at a level, 0 (as they are) to `coarsestLevel`. */
export function generalise(identity: BankIdentity, level: number): PublishedIdentity {
  const { cellType, commissionedYear, climateBand, layoutClass, clamping } = identity;
  const isHeld = clamping === 'rigid' || clamping === 'sprung';
  const from = Math.floor(commissionedYear / yearsPerBand) * yearsPerBand;
  const year = level < 2 ? String(commissionedYear) : `${from}-${from + yearsPerBand - 1}`;
  return {
    cellType: level < 6 ? cellType : otherCellType,
    commissioned: level < 5 ? year : anyValue,
    climateBand: level < 3 ? (climateBand ?? unknownValue) : anyValue,
    layoutClass: level < 4 ? layoutClass : anyValue,
    clamping: level < 1 || !isHeld ? clamping : 'clamped',
  };
}

export const identityKey = (identity: PublishedIdentity): string =>
  [
    identity.cellType,
    identity.commissioned,
    identity.climateBand,
    identity.layoutClass,
    identity.clamping,
  ].join('|');

/** Class of a layout: the voltage the bank is for, and whether cells stand in parallel. */
export function layoutClassOf({ series, parallel }: { series: number; parallel: number }): LayoutClass {
  const inSeries = series <= 4 ? '4' : series <= 8 ? '8' : series <= 16 ? '16' : 'more';
  return `${inSeries}s ${parallel > 1 ? 'parallel' : 'single'}`;
}
