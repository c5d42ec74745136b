import { cellTypeOf } from '@/data/demo/cellTypes';
import type { DemoBank } from '@/data/demo/types';
import type { PoolCheck } from '@/lib/fit';

import { isFailure } from '../pool/approvedRows';
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
        failedOn: bank.events.filter(({ kind }) => isFailure(kind)).map(({ happenedOn }) => happenedOn),
      };
      const checks = computeBank(bank)
        .filter(({ check }) => check.state === 'approved')
        .map(({ check, computed }) => ({
          ...{ id: check.id, testedOn: check.fields.reading.testedOn },
          ...{ conditions: check.fields.conditions, sources: check.fields.sources },
          ...computed,
          isRealFailure: false,
        }));
      return poolRows(pooled, checks).map(({ row }) => row);
    });
}
