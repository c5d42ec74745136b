import { minimumOwners } from '@/lib/contract/limits';
import { allBands, fitStrata } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import { digestsOf, dotsOf, evidenceOf, fitSeed, poolOf } from './describeRows';
import type { FitOutput, View } from './fitOutput';
import { holdBackChanges } from './holdBackChanges';

/**
 * The public fit: every cell type, whole and by band. A view whose change since it was last published concerns fewer
 * than five owners stays as it was. Pure.
 * @param previous the public fit in force
 */
export function fitPublic(rows: readonly PoolCheck[], previous: FitOutput | null): FitOutput {
  const fitted = fitStrata(rows, { seed: fitSeed, minOwners: minimumOwners });
  if (!fitted.ok) throw new Error(`the public fit ended early: ${fitted.reason}`);
  const views = fitted.curves.flatMap(({ cellType, bandKey, result }): View[] => {
    // A figure over all cell types is on no page; each would be one more to difference by.
    if (cellType === null) return [];
    const band = allBands.find(({ key }) => key === bandKey);
    const members = rows.filter((row) => row.cellType === cellType && (!band || band.includes(row)));
    const evidence = evidenceOf(members);
    const isHidden = evidence.owners < minimumOwners || (!result.ok && result.reason === 'protectsOthers');
    return [
      {
        cellType,
        bandKey,
        evidence: isHidden ? null : evidence,
        result,
        dots: isHidden ? [] : dotsOf(members),
        owners: isHidden ? {} : digestsOf(members),
      },
    ];
  });
  return { pool: poolOf(rows), views: holdBackChanges(views, previous?.views ?? []) };
}
