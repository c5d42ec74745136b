import type { Evidence } from '@/lib/contract/cells';
import type { Count, ToldEvidence } from '@/lib/contract/counts';

import { protections as inForce, type Protections } from './protections';

/** From here up a count is told as it is. */
const exactFrom = 20;
const ranges = [
  { from: 1, to: 4 },
  { from: 5, to: 9 },
  { from: 10, to: 19 },
] as const;

/** A count as the public gets it: 0 and from 20 up exact, between as a range. */
export function tellCount(count: number, { hasCountRanges }: Protections = inForce): Count {
  if (!hasCountRanges || count >= exactFrom || count === 0) return count;
  const { from, to } = ranges.find((range) => count <= range.to)!;
  return { from, to };
}

export const tellEvidence = (
  { owners, banks, checks }: Evidence,
  protections: Protections = inForce,
): ToldEvidence => ({
  owners: tellCount(owners, protections),
  banks: tellCount(banks, protections),
  checks: tellCount(checks, protections),
});
