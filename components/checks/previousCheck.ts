import type { Check } from '@/lib/contract/checks';

import { leftOutStates } from './checkWords';

/** The last check before a day that still stands, which conditions are counted from; null for a first one. */
export function previousCheck(checks: readonly Check[], testedOn: string, exceptId?: string): Check | null {
  const standing = checks.filter(
    ({ id, state, reading }) => id !== exceptId && !leftOutStates.has(state) && reading.testedOn < testedOn,
  );
  return standing.reduce<Check | null>(
    (last, check) => (last === null || check.reading.testedOn >= last.reading.testedOn ? check : last),
    null,
  );
}
