import { Op, type Sequelize, type WhereOptions } from 'sequelize';

import type { PoolSummary } from '@/lib/contract/cells';
import { minimumOwners } from '@/lib/contract/limits';

import { Bank, Check, PoolStep, PublicMember } from '../db/models';
import type { Deps } from '../deps';
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
export async function findWaiting({ db }: Deps, cellTypeId?: string): Promise<Waiting> {
  const [coming, leaving] = await Promise.all([placesComing(), placesLeaving()]);
  const changes = [...coming, ...leaving];
  const isConcerned = ({ cellType }: Place) => cellTypeId === undefined || cellType === cellTypeId;
  if (!changes.some(isConcerned)) return 'none';
  const groupOf = await groupsInForce(db);
  const ownersOf = new Map<string, Set<string>>();
  for (const { cellType, owner } of changes) {
    const owners = ownersOf.get(groupOf(cellType)) ?? new Set();
    ownersOf.set(groupOf(cellType), owners.add(owner));
  }
  const sizes = changes.filter(isConcerned).map(({ cellType }) => ownersOf.get(groupOf(cellType))!.size);
  return Math.max(...sizes) >= minimumOwners ? 'due' : 'fewerThanFiveOwners';
}

const bankOf = (where?: WhereOptions<Bank>) => ({
  model: Bank,
  as: 'bank',
  attributes: ['ownerId', 'cellTypeId'],
  where,
});

async function placesComing(): Promise<Place[]> {
  const checks = await Check.findAll({
    attributes: ['id'],
    where: { state: 'approved', '$member.checkId$': { [Op.is]: null } },
    include: [
      { model: PublicMember, as: 'member', attributes: [], required: false },
      bankOf({ bought: 'new' }),
    ],
  });
  return checks.map(placeOf);
}

async function placesLeaving(): Promise<Place[]> {
  const checks = await Check.findAll({
    attributes: ['id'],
    where: { [Op.or]: [{ state: { [Op.ne]: 'approved' } }, { '$bank.bought$': { [Op.ne]: 'new' } }] },
    include: [{ model: PublicMember, as: 'member', attributes: [], required: true }, bankOf()],
  });
  return checks.map(placeOf);
}

const placeOf = ({ bank }: Check): Place => ({ owner: bank!.ownerId, cellType: bank!.cellTypeId });

/** Members change by steps only, so their groups are worked out once per step. */
const groupsByStep = new WeakMap<Sequelize, { stepId: number; groupOf: (cellType: string) => string }>();

async function groupsInForce(db: Sequelize): Promise<(cellType: string) => string> {
  const stepId = (await PoolStep.max<number, PoolStep>('id')) ?? 0;
  const known = groupsByStep.get(db);
  if (known?.stepId === stepId) return known.groupOf;
  const members = await PublicMember.findAll();
  const groupOf = stepGroups(members.map(({ row }) => row));
  groupsByStep.set(db, { stepId, groupOf });
  return groupOf;
}
