import { cellTypeOf } from '@/data/demo/cellTypes';
import type { DemoBank } from '@/data/demo/types';
import type { PoolCheck } from '@/lib/fit';

import { poolRows } from '../pool/poolRow';
import { computeBank } from './demoChecks';

/** The rows that the demo's approved checks make in the pool, without a database: for the command line and tests. */
export function demoPool(banks: readonly DemoBank[]): PoolCheck[] {
  return banks
    .filter(({ fields }) => fields.bought === 'new')
    .flatMap((bank) => {
      const { id, ownerId, fields } = bank;
      const pooled = {
        ...{ id, ownerId, cellTypeId: fields.cellTypeId, firstUseMonth: fields.firstUseMonth },
        ratedAh: cellTypeOf(fields.cellTypeId).ratedAh * fields.parallel,
        isClampedNow: fields.clamping !== 'none',
        clampingChangedOn: [],
      };
      const checks = computeBank(bank)
        .filter(({ check }) => check.state === 'approved')
        .map(({ check, computed }) => ({
          ...{ id: check.id, testedOn: check.fields.reading.testedOn },
          ...{ conditions: check.fields.conditions, sources: check.fields.sources },
          ...computed,
        }));
      return poolRows(pooled, checks).map(({ row }) => row);
    });
}
