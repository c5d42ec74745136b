/** One part of an uncertainty budget: its relative standard uncertainty and its share of the variance of its half. */
export interface BudgetPart {
  name: string;
  relSd: number;
  varianceShare: number;
}

/** Standard uncertainty of a value known to lie within ± a limit, no place in it likelier: JCGM 100:2008, 4.3.7. */
export const rectangularSd = (halfWidth: number) => Math.abs(halfWidth) / Math.sqrt(3);

/** Combined standard uncertainty of uncorrelated parts, each already times its sensitivity: JCGM 100:2008, 5.1.2. */
export const combineInQuadrature = (standardUncertainties: number[]) => Math.hypot(...standardUncertainties);

/** The coverage factor of every ± that is shown, for about 95 %: JCGM 100:2008, 6.3.3. */
export const coverageFactor = 2;

/** Puts parts in order of size, each with its share of the variance; parts of nothing are left out. */
export function budgetOf(parts: { name: string; relSd: number }[]): BudgetPart[] {
  const total = combineInQuadrature(parts.map(({ relSd }) => relSd));
  return parts
    .filter(({ relSd }) => relSd > 0)
    .map((part) => ({ ...part, varianceShare: (part.relSd / total) ** 2 }))
    .sort((one, other) => other.relSd - one.relSd);
}
