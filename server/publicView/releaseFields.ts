import type { PoolCheck } from '@/lib/fit/poolCheck';

import type { PublishedIdentity } from './identity';
import { publishedRatedAh, rowSteps } from './publishedRow';

/** One row of a release: a check, its bank's name in this release, and what is told of the bank. */
export interface ReleaseRow {
  bank: string;
  identity: PublishedIdentity;
  row: PoolCheck;
}

type Value = string | number | boolean;

/** A column of a release: what it is, how coarse, and how it is made. */
export interface ReleaseField {
  name: string;
  title: string;
  unit: string | null;
  /** How far it is rounded or generalised. */
  coarseness: string;
  type: 'text' | 'number' | 'yesNo';
  isIdentifying: boolean;
  read: (row: ReleaseRow) => Value;
}

const steps = (field: keyof typeof rowSteps, unit = '') => `to ${rowSteps[field].step}${unit}`;
const decimals = (field: keyof typeof rowSteps) => rowSteps[field].decimals;

const text = (
  name: string,
  title: string,
  coarseness: string,
  read: (row: ReleaseRow) => string,
  isIdentifying = false,
): ReleaseField => ({ name, title, unit: null, coarseness, type: 'text', isIdentifying, read });

const measured = (
  name: string,
  field: keyof typeof rowSteps,
  title: string,
  unit: string | null,
): ReleaseField & { decimals: number } => ({
  ...{ name, title, unit, type: 'number', isIdentifying: false },
  coarseness: steps(field, unit === null ? '' : ` ${unit}`),
  decimals: decimals(field),
  read: ({ row }) => row[field],
});

const flag = (name: string, title: string, read: (row: ReleaseRow) => boolean): ReleaseField => ({
  ...{ name, title, unit: null, coarseness: 'as it is', type: 'yesNo', isIdentifying: false, read },
});

const sharedClass = 'generalised until the banks of at least 5 owners share all five of these fields';

/** Every column of a release, in its order. The files, the API's rows and the dictionary are made from this table. */
export const releaseFields: readonly ReleaseField[] = [
  text('bank', 'Name of the bank in this release', 'drawn anew for each release', ({ bank }) => bank),
  text(
    'cell_type',
    'Cell type by its key; "other" where too few owners have it',
    sharedClass,
    ({ identity }) => identity.cellType,
    true,
  ),
  text(
    'commissioned',
    'Year of first use, three years, or "any"',
    sharedClass,
    ({ identity }) => identity.commissioned,
    true,
  ),
  text(
    'climate_band',
    'cold, cool, mild, warm, hot, unknown, or "any"',
    sharedClass,
    ({ identity }) => identity.climateBand,
    true,
  ),
  text(
    'layout_class',
    'Cells in series up to 4, 8, 16 or more; single or several in parallel; or "any"',
    sharedClass,
    ({ identity }) => identity.layoutClass,
    true,
  ),
  text(
    'clamping',
    'none, rigid, sprung, clamped (its kind left out) or changed',
    sharedClass,
    ({ identity }) => identity.clamping,
    true,
  ),
  flag('clamped', 'Clamped for more than half of its full cycles to date', ({ row }) => row.isClamped),
  measured('years', 'ageYears', 'Years since first use', 'years'),
  measured('efc', 'efc', 'Equivalent full cycles since new', 'EFC'),
  measured('depth', 'depthFraction', 'Typical depth of discharge to date, as a fraction', null),
  measured('c_rate', 'dischargeIt', 'Mean discharge rate to date', 'It'),
  measured('temp_c', 'temperatureC', 'Mean cell temperature to date, weighted by ageing', '°C'),
  measured('soc_mean', 'socMeanFraction', 'Mean state of charge to date, as a fraction', null),
  {
    ...{ name: 'rated_ah', title: 'Rated capacity that capacity_ah refers to', unit: 'Ah', type: 'number' },
    ...{ coarseness: `${publishedRatedAh} for every bank`, isIdentifying: false },
    read: ({ row }) => row.ratedAh,
  },
  measured('capacity_ah', 'capacityAh', 'Capacity at 25 °C and 0.2 It, per 100 Ah of rating', 'Ah'),
  measured('rel_sd', 'relSd', 'Relative standard uncertainty that is new at each check', null),
  text(
    'temp_source',
    'metered, readOff or estimated',
    'as it is',
    ({ row }) => row.temperatureSource ?? 'metered',
  ),
  text('soc_source', 'metered, readOff or estimated', 'as it is', ({ row }) => row.socSource ?? 'metered'),
  flag(
    'keep',
    'Kept by a moderator as a real failure, whatever the screen says',
    ({ row }) => row.isKept ?? false,
  ),
  flag('failed', 'The bank is known to have failed by this check', ({ row }) => row.hasFailed ?? false),
];

const asText = (field: ReleaseField, value: Value): string => {
  if (typeof value === 'boolean') return value ? '1' : '0';
  if (typeof value === 'number' && 'decimals' in field) return value.toFixed(Number(field.decimals));
  return String(value);
};

/** Values hold neither commas nor quotes: keys, numbers and words of ours. */
export const csvHeader = releaseFields.map(({ name }) => name).join(',');
export const csvLine = (row: ReleaseRow): string =>
  releaseFields.map((field) => asText(field, field.read(row))).join(',');

/** The same row as an object, for JSON. */
export const asRecord = (row: ReleaseRow): Record<string, Value> =>
  Object.fromEntries(releaseFields.map((field) => [field.name, field.read(row)]));
