import { standardUse } from '@/lib/contract/cells';
import { minimumOwners } from '@/lib/contract/limits';
import { figureAt, type PooledFit } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import { isNamed } from '../publicView/publishedRow';
import { coverageOf, type ExpectedCheck } from './bins';
import { poolOf } from './describeRows';
import type { FitOutput } from './fitOutput';
import { presentEffects } from './presentEffects';
import { publishedPart } from './publishedFit';

/** Fewer banks than this, and a cell type is told by the pool's figure. */
const minimumBanks = 10;

/** The checks a fit used: what the screen quarantined and what no fit takes are out. */
export function usedRows(rows: readonly PoolCheck[], fit: PooledFit): PoolCheck[] {
  const out = new Set([
    ...fit.screen.filter(({ action }) => action === 'quarantine').map(({ row }) => row),
    ...fit.excluded.map(({ row }) => row),
  ]);
  return rows.filter((_, row) => !out.has(row));
}

/** What the working and the public fit publish alike; the views and pictures of checks differ. */
export function outputOf(
  rows: readonly PoolCheck[],
  fit: PooledFit,
  expected: readonly ExpectedCheck[],
): Omit<FitOutput, 'views' | 'bins' | 'survival' | 'prices'> {
  const model = publishedPart(fit);
  const own = model.cellTypes.filter(
    (one) => isNamed(one) && one.banks >= minimumBanks && one.owners >= minimumOwners,
  );
  return {
    pool: poolOf(rows),
    model,
    figures: own.map(({ cellType }) => ({ cellType, ...figureAt(model, standardUse, cellType) })),
    poolFigure: figureAt(model, standardUse, null),
    effects: presentEffects(fit.effects, fit.clampingClasses),
    coverage: coverageOf(expected),
  };
}
