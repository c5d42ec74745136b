import type { CellPage, FailureRate } from '@/lib/contract/cells';
import { minimumOwners } from '@/lib/contract/limits';
import { type FailureCount, failureRate } from '@/lib/fit';

import { tellCount } from '../publicView/tellCounts';
import type { FitInForce } from './currentFit';

/** Failures of a cell type and of the pool, each where at least five owners stand behind it. */
export function presentFailures(fit: FitInForce | null, cellTypeId: string): CellPage['failures'] {
  if (!fit) return { cellType: null, pool: null };
  const { pool, views } = fit.output;
  const whole = views.find(({ cellType, bandKey }) => cellType === cellTypeId && bandKey === null);
  const isTold = whole?.evidence && whole.evidence.owners >= minimumOwners;
  return {
    cellType: isTold ? rateOf(whole.failures) : null,
    pool: pool.evidence.owners >= minimumOwners ? rateOf(pool.failures) : null,
  };
}

function rateOf(count: FailureCount | null): FailureRate | null {
  if (!count || count.bankYears <= 0) return null;
  return {
    ...count,
    banks: tellCount(count.banks),
    per100BankYears: failureRate(count.failures, count.bankYears),
  };
}
