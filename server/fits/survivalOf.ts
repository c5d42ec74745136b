import type { Survival } from '@/lib/contract/cells';
import { minimumOwners } from '@/lib/contract/limits';
import { crossingsOf, turnbull, turnbullSurvival, weibull, weibullSurvival } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import { digestsOf } from './describeRows';
import type { FitOutput, SurvivalPart } from './fitOutput';

/** 95 % quantile of the standard normal: ends of a 90 % range. */
const z90 = 1.6448536269514722;
const rounded = (share: number) => Math.round(share * 1000) / 1000;

type Crossing = ReturnType<typeof crossingsOf>['crossings'][number];

/**
 * Share of banks still above 80 % at whole ages, of each cell type and of all (Turnbull, with late entry), as far as at
 * least five owners have banks under observation; beside it a Weibull curve where five owners' banks have crossed.
 * Before anything is held back.
 */
export function survivalOf(rows: readonly PoolCheck[]): SurvivalPart[] {
  const cellTypes = [...new Set(rows.map(({ cellType }) => cellType))].sort();
  return [null, ...cellTypes].map((cellType) => {
    const members = cellType === null ? rows : rows.filter((row) => row.cellType === cellType);
    const told = tellSurvival(crossingsOf(members).crossings);
    return { cellType, told, owners: told ? digestsOf(members) : {} };
  });
}

function tellSurvival(crossings: readonly Crossing[]): Survival | null {
  if (ownersOf(crossings) < minimumOwners) return null;
  const steps = turnbull(crossings);
  if (!steps.ok) return null;
  const hasFewCrossings = ownersOf(crossings.filter(({ right }) => right < Infinity)) < minimumOwners;
  const smooth = hasFewCrossings ? null : weibull(crossings);
  const points: Survival['points'] = [];
  for (let years = 1; ownersOf(crossings.filter(({ left }) => left >= years)) >= minimumOwners; years++) {
    const { lower, upper } = turnbullSurvival(steps, years);
    const range = shareRange((lower + upper) / 2, knownAt(crossings, years));
    points.push({
      ...{ years, lowestFraction: rounded(lower), highestFraction: rounded(upper) },
      lowerFraction: rounded(Math.min(range.lower, lower)),
      upperFraction: rounded(Math.max(range.upper, upper)),
      smoothFraction: smooth?.ok ? rounded(weibullSurvival(smooth, years)) : null,
    });
  }
  return points.length > 0 ? { points, hasFewCrossings } : null;
}

const ownersOf = (crossings: readonly Crossing[]) => new Set(crossings.map(({ owner }) => owner)).size;

/** Banks that had joined by an age and whose standing at it is known. */
const knownAt = (crossings: readonly Crossing[], years: number) =>
  crossings.filter(({ entry = 0, left, right }) => entry <= years && (left >= years || right <= years))
    .length;

/**
 * 90 % range of a share from so many banks: Wilson's score interval (Wilson 1927, J. Am. Stat. Assoc. 22, 209-212),
 * used on a survival curve with the number known at that age as Rothman 1978 (J. Chronic Dis. 31, 557-560) does. It
 * stays honest where no bank has crossed yet.
 */
function shareRange(share: number, count: number): { lower: number; upper: number } {
  if (count === 0) return { lower: 0, upper: 1 };
  const spread = z90 ** 2 / count;
  const middle = (share + spread / 2) / (1 + spread);
  const half = (z90 / (1 + spread)) * Math.sqrt((share * (1 - share)) / count + spread / (4 * count));
  return { lower: Math.max(0, middle - half), upper: Math.min(1, middle + half) };
}

/** What is told of a cell type, or of all (null). */
export const presentSurvival = (
  { survival }: Pick<FitOutput, 'survival'>,
  cellType: string | null,
): Survival | null => survival.find((part) => part.cellType === cellType)?.told ?? null;
