import { convert } from '@/lib/units';

interface Limit {
  min: number;
  max: number;
}

/** One unit a column may be given in; its suffix ends the column's name. */
export interface ColumnUnit {
  suffix: string;
  /** As it is shown; empty for plain counts. */
  unit: string;
  /** In the stored unit. */
  limit: Limit;
  /** Typed to stored, and back; `ratedAh` is the bank's rated capacity. */
  toStored: (typed: number, ratedAh: number) => number;
  toTyped: (stored: number, ratedAh: number) => number;
}

type UnitsOf = (limit: Limit) => ColumnUnit[];

const digits = 12;
const tidy = (value: number) => Number(value.toPrecision(digits));

function scaled(limit: Limit, suffix: string, unit: string, storedPerTyped = 1): ColumnUnit {
  const toStored = (typed: number) => tidy(typed * storedPerTyped);
  return { suffix, unit, limit, toStored, toTyped: (stored) => tidy(stored / storedPerTyped) };
}

export const percent: UnitsOf = (limit) => [scaled(limit, 'percent', '%', 0.01)];
export const ampereHours: UnitsOf = (limit) => [scaled(limit, 'ah', 'Ah')];
export const energy: UnitsOf = (limit) => [scaled(limit, 'kwh', 'kWh', 1000), scaled(limit, 'wh', 'Wh')];
export const amperes: UnitsOf = (limit) => [scaled(limit, 'a', 'A')];
export const minutes: UnitsOf = (limit) => [scaled(limit, 'min', 'min')];
export const hours: UnitsOf = (limit) => [scaled(limit, 'h', 'h', 3600)];
export const volts: UnitsOf = (limit) => [scaled(limit, 'v', 'V'), scaled(limit, 'mv', 'mV', 0.001)];
export const plain: UnitsOf = (limit) => [scaled(limit, '', '')];

export const degrees: UnitsOf = (limit) => [
  scaled(limit, 'c', '°C'),
  {
    ...{ suffix: 'f', unit: '°F', limit },
    toStored: (typed) => tidy(convert(typed, '°F', '°C')),
    toTyped: (stored) => tidy(convert(stored, '°C', '°F')),
  },
];

/** Of the bank's rated capacity, or the amperes of the whole bank. */
export const rates: UnitsOf = (limit) => [
  scaled(limit, 'it', 'It'),
  {
    ...{ suffix: 'a', unit: 'A', limit },
    toStored: (typed, ratedAh) => tidy(typed / ratedAh),
    toTyped: (stored, ratedAh) => tidy(stored * ratedAh),
  },
];

/** What a counter shows is stored with its kind, in the unit it is of. */
export const counterUnits = (limits: { efc: Limit; counterAh: Limit; counterKwh: Limit }): ColumnUnit[] => [
  scaled(limits.efc, 'efc', 'full cycles'),
  scaled(limits.counterAh, 'ah', 'Ah'),
  scaled(limits.counterKwh, 'kwh', 'kWh'),
];
