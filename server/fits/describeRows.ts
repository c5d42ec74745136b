import { createHash } from 'node:crypto';

import { quantile } from 'simple-statistics';

import type { Evidence } from '@/lib/contract/cells';
import { countFailures } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import type { FitOutput, View } from './fitOutput';

/** Seed of every resampling of banks: the same rows give the same ranges. */
export const fitSeed = 20_260_101;

export function evidenceOf(rows: readonly PoolCheck[]): Evidence {
  return {
    owners: new Set(rows.map(({ owner }) => owner)).size,
    banks: new Set(rows.map(({ bank }) => bank)).size,
    checks: rows.length,
  };
}

/** The pool's own figures; reach is the 95 % quantile of the readings' years. */
export function poolOf(rows: readonly PoolCheck[]): FitOutput['pool'] {
  const years = rows.map(({ ageYears }) => ageYears);
  return {
    evidence: evidenceOf(rows),
    reachYears: years.length > 0 ? quantile(years, 0.95) : null,
    failures: countFailures(rows),
  };
}

/** Checks as public dots: rounded, and in an order that does not tell which belong to one bank. */
export function dotsOf(rows: readonly PoolCheck[]): View['dots'] {
  return rows
    .map(({ ageYears, efc, capacityAh, ratedAh }): View['dots'][number] => [
      Math.round(ageYears * 10) / 10,
      Math.round(efc / 10) * 10,
      Math.round((capacityAh / ratedAh) * 1000) / 1000,
    ])
    .sort((a, b) => a[0] - b[0] || a[1] - b[1] || a[2] - b[2]);
}

/** A key of an owner that is not their id. */
export const ownerKey = (owner: string) => shortHash(`owner ${owner}`);

/** Digest of each owner's rows. */
export function digestsOf(rows: readonly PoolCheck[]): View['owners'] {
  const linesOf = new Map<string, string[]>();
  for (const row of rows) {
    const lines = linesOf.get(row.owner);
    if (lines) lines.push(rowText(row));
    else linesOf.set(row.owner, [rowText(row)]);
  }
  return Object.fromEntries(
    [...linesOf].map(([owner, lines]) => [ownerKey(owner), shortHash(lines.sort().join('\n'))]),
  );
}

/** How many rows are whose, by the same keys. */
export function countsOf(rows: readonly PoolCheck[]): View['counts'] {
  const counts: View['counts'] = {};
  for (const { owner } of rows) counts[ownerKey(owner)] = (counts[ownerKey(owner)] ?? 0) + 1;
  return counts;
}

/** SHA-256 over the rows as text, in an order of their own. */
export function dataHashOf(rows: readonly PoolCheck[]): string {
  return createHash('sha256').update(rows.map(rowText).sort().join('\n')).digest('hex');
}

/** Rows are told apart many times over: each is written out once. */
const texts = new WeakMap<PoolCheck, string>();

function rowText(row: PoolCheck): string {
  const known = texts.get(row);
  if (known !== undefined) return known;
  const text = JSON.stringify(Object.entries(row).sort(([a], [b]) => (a < b ? -1 : 1)));
  texts.set(row, text);
  return text;
}

export const shortHash = (text: string) => createHash('sha256').update(text).digest('hex').slice(0, 12);
