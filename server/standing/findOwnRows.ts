import type { Standing } from '@/lib/contract/standing';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import type { LoadedBank } from '../banks/queries';
import { Check } from '../db/models';
import { pooledBank, pooledCheck } from '../pool/approvedRows';
import { poolRows } from '../pool/poolRow';

/** A bank's approved checks as the fit sees them, and what is to be said of them. */
export interface OwnRows {
  /** In order of their day; those that the fit set aside are out. */
  rows: PoolCheck[];
  approved: number;
  notes: Standing['notes'];
}

/** Also of a bank bought used, which the pool leaves out: its own curve is of use to its owner. */
export async function findOwnRows(bank: LoadedBank, setAside: ReadonlySet<string>): Promise<OwnRows> {
  const checks = await Check.findAll({
    where: { bankId: bank.id, state: 'approved' },
    order: [
      ['testedOn', 'ASC'],
      ['id', 'ASC'],
    ],
  });
  const members = poolRows(pooledBank(bank), checks.map(pooledCheck));
  const kept = members.filter(({ checkId }) => !setAside.has(checkId));
  return {
    rows: kept.map(({ row }) => row),
    approved: members.length,
    notes: [
      ...(bank.bought === 'used' ? (['boughtUsed'] as const) : []),
      ...(bank.bought === 'unknown' ? (['boughtUnknown'] as const) : []),
      ...(members.some(({ row }) => row.isClampingUnclear) ? (['clampingUnclear'] as const) : []),
      ...(kept.length < members.length ? (['checksSetAside'] as const) : []),
    ],
  };
}
