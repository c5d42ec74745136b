import type { Claim, Use } from '@/lib/contract/cells';

const daysPerYear = 365.2425;

/** Equivalent full cycles a year at a use. */
export const efcPerYear = ({ depthFraction, cyclesPerDay }: Use): number =>
  depthFraction * cyclesPerDay * daysPerYear;

/** Years that a claim's full cycles last at a use; undefined where the claim does not state its depth. */
export function quotedYears({ efc }: Claim, use: Use): number | undefined {
  return efc === null ? undefined : efc / efcPerYear(use);
}
