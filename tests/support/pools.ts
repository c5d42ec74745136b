import { readFileSync } from 'node:fs';
import type { PoolCheck } from '@/lib/fit/poolCheck';
import { parsePool } from '@/scripts/fit/readPool';
import { readReferenceJson, referencePath } from './reference';

/** R's answer to one fixture pool (the part the tests compare). */
export interface PoolReference {
  rows: number;
  banks: number;
  models: number;
  minus_log_posterior: number;
  estimates: Record<string, { estimate: number; se: number }>;
  covariance: number[][];
  sd: { s: number; sc: number; su: number; sm: number };
  model_effects: Record<string, number>;
  clamp_life_ratio_typical: { ln_ratio: number; se: number };
  clamp_life_ratio_hard: { ln_ratio: number; se: number };
  lifetimes: Record<
    string,
    {
      T80_years: number;
      se_ln_T80: number;
      T80_efc: number;
      fade_at_8y: number;
      se_ln_fade_8y: number;
      range_8of10_years_any_model: [number, number];
    }
  >;
}

/** Checks of one fixture pool, in the file's order. */
export function readPoolFixture(name: string): PoolCheck[] {
  const pool = parsePool(readPoolText(name));
  if (!pool.ok) throw new Error(`the fixture ${name} is refused: ${JSON.stringify(pool.problems[0])}`);
  return pool.checks;
}

export function readPoolText(name: string): string {
  return readFileSync(referencePath(`fit/${name}.csv`), 'utf8');
}

export function readPoolReference(name: string): PoolReference {
  return readReferenceJson<{ main: PoolReference }>(`fit/${name}.reference.json`).main;
}

/** The fixture's column of planted gross mistakes, in the file's order. */
export function readPlantedOutliers(name: string): boolean[] {
  const [header = '', ...lines] = readPoolText(name).trim().split('\n');
  const place = header.split(',').indexOf('is_outlier');
  return lines.map((line) => line.split(',')[place]?.trim() === '1');
}

/** Every number in a JSON-like value, with its path. */
export function numbersIn(value: unknown, path = ''): { path: string; value: number }[] {
  if (typeof value === 'number') return [{ path, value }];
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) => numbersIn(inner, `${path}.${key}`));
}
