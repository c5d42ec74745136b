import { Op } from 'sequelize';

import { Bank, Check, Fit, TrailEntry } from '../db/models';
import { ownerKey } from './describeRows';

/** The data of a fit are read somewhat before it begins. */
const marginMs = 60_000;

/** Keys of the owners of whom a check was recalled at once since the data of a fit were read. */
export async function findAtOnceOwners(fitId: string): Promise<string[]> {
  const { createdAt, durationMs } = await Fit.findByPk(fitId, {
    attributes: ['createdAt', 'durationMs'],
    rejectOnEmpty: true,
  });
  const since = new Date(createdAt.getTime() - durationMs - marginMs);
  const entries = await TrailEntry.findAll({
    attributes: ['subjectId'],
    where: { action: 'recalledAtOnce', at: { [Op.gte]: since } },
  });
  if (entries.length === 0) return [];
  const checks = (await Check.findAll({
    attributes: ['id'],
    where: { id: entries.map(({ subjectId }) => subjectId) },
    include: [{ model: Bank, as: 'bank', attributes: ['ownerId'] }],
  })) as (Check & { bank: Bank })[];
  return checks.map(({ bank }) => ownerKey(bank.ownerId));
}
