import { minimumOwners } from '@/lib/contract/limits';
import { countFailures, type PooledFit } from '@/lib/fit';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import { expectChecks } from './bins';
import { dotsOf, evidenceOf } from './describeRows';
import type { FitOutput } from './fitOutput';
import { outputOf, usedRows } from './outputOf';

/** What the working fit stores: the pooled model over all approved checks, and each cell type's checks. Pure. */
export function workingOutput(rows: readonly PoolCheck[], fit: PooledFit): FitOutput {
  const cellTypes = [...new Set(rows.map(({ cellType }) => cellType))].sort();
  return {
    ...outputOf(rows, fit, expectChecks(usedRows(rows, fit), fit)),
    views: cellTypes.map((cellType) => {
      const members = rows.filter((row) => row.cellType === cellType);
      const evidence = evidenceOf(members);
      return {
        ...{ cellType, bandKey: null, result: null, owners: {}, counts: {} },
        evidence: evidence.owners >= minimumOwners ? evidence : null,
        dots: dotsOf(members),
        failures: countFailures(members),
      };
    }),
    ...{ bins: [], survival: [], prices: [] },
  };
}
