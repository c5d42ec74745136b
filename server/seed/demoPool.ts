import { cellTypeOf } from '@/data/demo/cellTypes';
import type { DemoBank } from '@/data/demo/types';
import type { PoolCheck } from '@/lib/fit';

import { isFailure } from '../pool/approvedRows';
import { type ApprovedMember, poolRows } from '../pool/poolRow';
import { layoutClassOf } from '../publicView/identity';
import { computeBank } from './demoChecks';

/** The rows that the demo's approved checks make in the pool, without a database: for the command line and tests. */
export const demoPool = (banks: readonly DemoBank[]): PoolCheck[] => demoMembers(banks).map(({ row }) => row);

/** The same with the fields by which a bank could be found. */
export function demoMembers(banks: readonly DemoBank[]): ApprovedMember[] {
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
      const identity = {
        cellType: fields.cellTypeId,
        commissionedYear: Number(fields.firstUseMonth.slice(0, 4)),
        climateBand: fields.climateBand,
        layoutClass: layoutClassOf(fields),
        clamping: fields.clamping,
      };
      const checks = computeBank(bank)
        .filter(({ check }) => check.state === 'approved')
        .map(({ check, computed }) => ({
          ...{ id: check.id, testedOn: check.fields.reading.testedOn },
          ...{ conditions: check.fields.conditions, sources: check.fields.sources },
          ...computed,
          isRealFailure: false,
        }));
      return poolRows(pooled, checks).map((member) => ({ ...member, identity }));
    });
}
