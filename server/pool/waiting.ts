import { Op } from 'sequelize';

import type { PoolSummary } from '@/lib/contract/cells';
import { minimumOwners } from '@/lib/contract/limits';

import { Bank, Check, PublicMember } from '../db/models';
import { stepGroups } from './planStep';

type Waiting = PoolSummary['waiting'];

interface Place {
  owner: string;
  cellType: string;
}

/**
 * Whether approved changes wait to go public, over the whole pool or for one cell type. Counts checks to come in and to
 * be taken out; rows that only changed their values are left to the step itself.
 */
export async function findWaiting(cellTypeId?: string): Promise<Waiting> {
  const [coming, members] = await Promise.all([placesComing(), placesOfMembers()]);
  const changes = [...coming, ...members.filter(({ isLeaving }) => isLeaving)];
  const groupOf = stepGroups(members);
  const ownersOf = new Map<string, Set<string>>();
  for (const { cellType, owner } of changes) {
    const owners = ownersOf.get(groupOf(cellType)) ?? new Set();
    ownersOf.set(groupOf(cellType), owners.add(owner));
  }
  const concerned = changes.filter(({ cellType }) => cellTypeId === undefined || cellType === cellTypeId);
  const sizes = concerned.map(({ cellType }) => ownersOf.get(groupOf(cellType))!.size);
  if (sizes.length === 0) return 'none';
  return Math.max(...sizes) >= minimumOwners ? 'due' : 'fewerThanFiveOwners';
}

async function placesComing(): Promise<Place[]> {
  const checks = await Check.findAll({
    attributes: ['id'],
    where: { state: 'approved', '$member.checkId$': { [Op.is]: null } },
    include: [
      { model: PublicMember, as: 'member', attributes: [], required: false },
      { model: Bank, as: 'bank', attributes: ['ownerId', 'cellTypeId'], where: { bought: 'new' } },
    ],
  });
  return checks.map(({ bank }) => ({ owner: bank!.ownerId, cellType: bank!.cellTypeId }));
}

async function placesOfMembers(): Promise<(Place & { isLeaving: boolean })[]> {
  const checks = await Check.findAll({
    attributes: ['id', 'state'],
    include: [
      { model: PublicMember, as: 'member', attributes: [], required: true },
      { model: Bank, as: 'bank', attributes: ['ownerId', 'cellTypeId', 'bought'] },
    ],
  });
  return checks.map(({ state, bank }) => ({
    owner: bank!.ownerId,
    cellType: bank!.cellTypeId,
    isLeaving: state !== 'approved' || bank!.bought !== 'new',
  }));
}
