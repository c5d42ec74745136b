import { minimumOwners } from '@/lib/contract/limits';
import type { PoolCheck } from '@/lib/fit/poolCheck';

import type { PoolMember } from './poolRow';

export interface StepPlan {
  /** Rows to write: new members, and members whose row has changed since. */
  put: PoolMember[];
  /** Ids of the checks to take out. */
  remove: string[];
  /** How many owners the step concerns. */
  owners: number;
}

interface Change {
  checkId: string;
  cellType: string;
  owner: string;
  put: PoolMember | null;
}

/**
 * What of the difference between the approved checks and the public pool may go public now.
 *
 * A step must not be told apart into changes of fewer than five owners. Figures stand per cell type, so the changes of
 * each published cell type are counted by themselves; cell types of which nothing is published (fewer than five owners
 * in the pool) show in the pool's totals only and are counted together.
 */
export function planStep(approved: readonly PoolMember[], members: readonly PoolMember[]): StepPlan | null {
  const groupOf = stepGroups(members.map(({ row }) => row));
  const byGroup = new Map<string, Change[]>();
  for (const change of changesBetween(approved, members)) {
    const group = groupOf(change.cellType);
    byGroup.set(group, [...(byGroup.get(group) ?? []), change]);
  }
  const released = [...byGroup.values()].filter((changes) => countOwners(changes) >= minimumOwners).flat();
  if (released.length === 0) return null;
  return {
    put: released.map(({ put }) => put).filter((member) => member !== null),
    remove: released.filter(({ put }) => put === null).map(({ checkId }) => checkId),
    owners: countOwners(released),
  };
}

/** Names the group in which a cell type's changes are counted: its own, or the rest's. */
export function stepGroups(
  members: readonly Pick<PoolCheck, 'owner' | 'cellType'>[],
): (cellType: string) => string {
  const ownersOf = new Map<string, Set<string>>();
  for (const { owner, cellType } of members) {
    const owners = ownersOf.get(cellType) ?? new Set();
    ownersOf.set(cellType, owners.add(owner));
  }
  return (cellType) => ((ownersOf.get(cellType)?.size ?? 0) >= minimumOwners ? cellType : 'rest of the pool');
}

function changesBetween(approved: readonly PoolMember[], members: readonly PoolMember[]): Change[] {
  const public_ = new Map(members.map(({ checkId, row }) => [checkId, row]));
  const changes: Change[] = [];
  for (const member of approved) {
    const { checkId, row } = member;
    const before = public_.get(checkId);
    public_.delete(checkId);
    if (before && isSame(before, row)) continue;
    changes.push({ checkId, cellType: row.cellType, owner: row.owner, put: member });
  }
  for (const [checkId, { cellType, owner }] of public_) changes.push({ checkId, cellType, owner, put: null });
  return changes;
}

const isSame = (one: PoolCheck, other: PoolCheck) =>
  Object.keys({ ...one, ...other }).every(
    (key) => one[key as keyof PoolCheck] === other[key as keyof PoolCheck],
  );

const countOwners = (changes: readonly Change[]) => new Set(changes.map(({ owner }) => owner)).size;
