import { Op, type WhereOptions } from 'sequelize';

import type { PoolSummary } from '@/lib/contract/cells';

import { Bank, Check, PublicMember } from '../db/models';
import type { Deps } from '../deps';

type Waiting = PoolSummary['waiting'];

interface Place {
  cellType: string;
}

/**
 * Whether approved changes wait to go public, over the whole pool or for one cell type: `due` while a refit is to look
 * at them, and after that those too few of which are alike. Counts checks to come in and to be taken out; rows that only
 * changed their values are left to the step itself.
 */
export async function findWaiting({ jobs }: Deps, cellTypeId?: string): Promise<Waiting> {
  const [coming, leaving] = await Promise.all([placesComing(), placesLeaving()]);
  const isConcerned = ({ cellType }: Place) => cellTypeId === undefined || cellType === cellTypeId;
  if (![...coming, ...leaving].some(isConcerned)) return 'none';
  return (await jobs.countPending('refit')) > 0 ? 'due' : 'fewerThanFiveOwners';
}

const bankOf = (where?: WhereOptions<Bank>) => ({
  model: Bank,
  as: 'bank',
  attributes: ['cellTypeId'],
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

const placeOf = ({ bank }: Check): Place => ({ cellType: bank!.cellTypeId });
