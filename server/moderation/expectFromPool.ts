import { looResiduals, type PublishedFit } from '@/lib/fit';

import { type PooledBank, type PooledCheck, poolRows } from '../pool/poolRow';
import type { PoolExpectation } from './screenTypes';

/**
 * What a fit expects of a check: predicted from the bank's other approved checks, or, for a first one, from banks used
 * like it. Pure.
 * @param others the bank's approved checks, this one left out, in order of their day
 */
export function expectFromPool(
  fit: PublishedFit,
  bank: PooledBank,
  { check, others }: { check: PooledCheck; others: readonly PooledCheck[] },
): PoolExpectation {
  const all = [...others, check].sort((a, b) => (a.testedOn < b.testedOn ? -1 : 1));
  const members = poolRows(bank, all);
  const place = members.findIndex(({ checkId }) => checkId === check.id);
  const residual = looResiduals(
    members.map(({ row }) => row),
    fit,
  ).find(({ row }) => row === place)!;
  return {
    seenFraction: residual.seen,
    expectedFraction: residual.predicted,
    t: residual.t,
    others: others.length,
  };
}
