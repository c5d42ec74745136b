import type { Transaction } from 'sequelize';

import type { BankEventKind } from '@/lib/contract/banks';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import { Bank, BankEvent, CellType, Check } from '../db/models';
import { type BankIdentity, layoutClassOf } from '../publicView/identity';
import { type ApprovedMember, type PooledBank, type PooledCheck, poolRows } from './poolRow';

/** What an owner tells of that counts as a failure of the bank. */
const failureEvents: readonly BankEventKind[] = ['cellFailed', 'swollen'];
export const isFailure = (kind: BankEventKind): boolean => failureEvents.includes(kind);
const pooledEvents: BankEventKind[] = ['clampingChanged', ...failureEvents];

interface ApprovedFilter {
  cellTypeId?: string;
}

type LoadedBank = Bank & { cellType: Pick<CellType, 'ratedAh'>; events: BankEvent[] };

/**
 * All approved checks as rows of the working fit. Banks bought used or of unknown past are left out: their start is
 * not known.
 */
export async function approvedRows(
  transaction: Transaction,
  filter: ApprovedFilter = {},
): Promise<PoolCheck[]> {
  return (await approvedMembers(transaction, filter)).map(({ row }) => row);
}

/** The same, each with its check's id, in a fixed order. */
export async function approvedMembers(
  transaction: Transaction,
  { cellTypeId }: ApprovedFilter = {},
): Promise<ApprovedMember[]> {
  const banks = (await Bank.findAll({
    where: { bought: 'new', ...(cellTypeId === undefined ? {} : { cellTypeId }) },
    include: [
      { model: CellType, as: 'cellType', attributes: ['ratedAh'] },
      { model: BankEvent, as: 'events', separate: true, where: { kind: pooledEvents } },
    ],
    order: [['id', 'ASC']],
    transaction,
  })) as LoadedBank[];
  const checksOf = await approvedChecksByBank(transaction);
  return banks.flatMap((bank) => {
    const identity = identityOf(bank);
    const rows = poolRows(pooledBank(bank), (checksOf.get(bank.id) ?? []).map(pooledCheck));
    return rows.map((member) => ({ ...member, identity }));
  });
}

/** The fields by which a bank could be found. */
function identityOf(bank: LoadedBank): BankIdentity {
  const hasChanged = bank.events.some(({ kind }) => kind === 'clampingChanged');
  return {
    cellType: bank.cellTypeId,
    commissionedYear: Number(bank.firstUseMonth.slice(0, 4)),
    climateBand: bank.climateBand,
    layoutClass: layoutClassOf(bank),
    clamping: hasChanged ? 'changed' : bank.clamping,
  };
}

/** A bank as its rows are made from it; of its events changes of the clamping and failures count. */
export function pooledBank(bank: LoadedBank): PooledBank {
  const daysOf = (isWanted: (kind: BankEventKind) => boolean) =>
    bank.events
      .filter(({ kind }) => isWanted(kind))
      .map(({ happenedOn }) => happenedOn)
      .sort();
  return {
    id: bank.id,
    ownerId: bank.ownerId,
    cellTypeId: bank.cellTypeId,
    ratedAh: bank.cellType.ratedAh * bank.parallel,
    firstUseMonth: bank.firstUseMonth,
    isClampedNow: bank.clamping !== 'none',
    clampingChangedOn: daysOf((kind) => kind === 'clampingChanged'),
    failedOn: daysOf(isFailure),
  };
}

type PooledColumns = Pick<
  Check,
  'id' | 'testedOn' | 'ageYears' | 'efc' | 'computed' | 'conditions' | 'sources' | 'isRealFailure'
>;

/** A check as its row is made from it. */
export function pooledCheck(check: PooledColumns): PooledCheck {
  const { id, testedOn, ageYears, efc, computed, conditions, sources, isRealFailure } = check;
  const { capacityRefAh, relSdNew } = computed;
  return { id, testedOn, ageYears, efc, capacityRefAh, relSdNew, conditions, sources, isRealFailure };
}

async function approvedChecksByBank(transaction: Transaction): Promise<Map<string, Check[]>> {
  const checks = await Check.findAll({
    where: { state: 'approved' },
    attributes: [
      ...['id', 'bankId', 'testedOn', 'ageYears', 'efc', 'computed', 'conditions', 'sources'],
      'isRealFailure',
    ],
    order: [
      ['testedOn', 'ASC'],
      ['id', 'ASC'],
    ],
    transaction,
  });
  const byBank = new Map<string, Check[]>();
  for (const check of checks) {
    const known = byBank.get(check.bankId);
    if (known) known.push(check);
    else byBank.set(check.bankId, [check]);
  }
  return byBank;
}
