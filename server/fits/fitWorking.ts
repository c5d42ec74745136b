import { fitCurve } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';
import { minimumOwners } from '@/lib/contract/limits';

import { dotsOf, evidenceOf, fitSeed, poolOf } from './describeRows';
import type { FitOutput } from './fitOutput';

/** The working fit: one curve per cell type over all approved checks. Pure. */
export function fitWorking(rows: readonly PoolCheck[]): FitOutput {
  const cellTypes = [...new Set(rows.map(({ cellType }) => cellType))].sort();
  return {
    pool: poolOf(rows),
    views: cellTypes.map((cellType) => {
      const members = rows.filter((row) => row.cellType === cellType);
      const evidence = evidenceOf(members);
      return {
        cellType,
        bandKey: null,
        evidence: evidence.owners >= minimumOwners ? evidence : null,
        result: fitCurve(members, { seed: fitSeed, minOwners: minimumOwners }),
        dots: dotsOf(members),
        owners: {},
      };
    }),
  };
}
