/**
 * The parameters psi of the pooled fade model, in the order used by every vector and matrix here.
 * Meaning and units: lib/fit/README.md, section 1.
 */
export const parameterNames = [
  'c0',
  'lnA',
  'aT',
  'aS',
  'lnB',
  'z',
  'bD',
  'bC',
  'bT',
  'bK',
  'ln_s',
  'ln_sc',
  'ln_su',
  'ln_sm',
] as const;

/** Name of one parameter; `extra` is the one added term of an interaction refit. */
export type ParameterName = (typeof parameterNames)[number] | 'extra';

/** Position of each parameter in psi. */
export const at = {
  c0: 0,
  lnA: 1,
  aT: 2,
  aS: 3,
  lnB: 4,
  z: 5,
  bD: 6,
  bC: 7,
  bT: 8,
  bK: 9,
  lnS: 10,
  lnSc: 11,
  lnSu: 12,
  lnSm: 13,
  extra: 14,
} as const;

/** Parameters of the mean curve that act on ln q: lnA aT aS | lnB z bD bC bT bK (| extra). */
export const calendarCount = 3;
export const cyclingCount = 6;
export const baseParameterCount = parameterNames.length;

/** Instrument sd at which w = 1 (1.2 %). */
export const referenceRelSd = 0.012;
/** Beyond this q, ln(1 - q) goes on by its tangent, so that a nearly dead bank keeps a finite score. */
export const tangentFade = 0.9;
/** End of life by convention: 80 % of rated capacity. */
export const endOfLifeShare = 0.8;

const gasConstantKjPerMolK = 8.314e-3;

/** Centred inverse temperature, mol/kJ: tau = (1/298.15 - 1/T_K) / R. Zero at 25 °C. */
export function tau(temperatureC: number): number {
  return (1 / 298.15 - 1 / (temperatureC + 273.15)) / gasConstantKjPerMolK;
}
