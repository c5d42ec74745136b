import type { Transaction } from 'sequelize';

import { PoolStep, PublicMember } from '../db/models';
import { isSafeGroup } from '../publicView/admitChanges';
import { classOf, type PublicBank } from '../publicView/bankRows';
import { coarsestLevel } from '../publicView/identity';
import { protections } from '../publicView/protections';
import { appendTrail } from '../trail/appendTrail';
import { publicBanks } from './planStep';
import { publicMembers } from './publicMembers';

/**
 * Takes one check out of the public pool in a step of its own, in the caller's transaction. Banks that shared its class
 * are generalised further where too few are left in it, so that none of them stands out by the going; those that even
 * the coarsest class is too thin for leave too, and come back with a later step.
 */
export async function leaveAtOnce(checkId: string, at: Date, transaction: Transaction): Promise<void> {
  const members = await publicMembers(transaction);
  const leaving = publicBanks(members).find(({ checks }) => checks.some((one) => one.checkId === checkId));
  if (!leaving) return;
  const left = publicBanks(members.filter((member) => member.checkId !== checkId));
  const { coarser, dropped } = coarsen(left, leaving);
  const remove = [checkId, ...idsOf(dropped)];
  await PublicMember.destroy({ where: { checkId: remove }, transaction });
  for (const bank of coarser)
    await PublicMember.update(
      { level: bank.level },
      { where: { checkId: bank.checks.map((one) => one.checkId) }, transaction },
    );
  const owners = new Set([leaving, ...coarser, ...dropped].map(({ owner }) => owner)).size;
  const counts = { owners, added: 0, removed: remove.length };
  const step = await PoolStep.create({ ...counts, createdAt: at }, { transaction });
  await appendTrail(
    {
      ...{ actor: 'system', at, subjectType: 'pool', subjectId: String(step.id), action: 'stepped' },
      details: { ...counts, put: idsOf(coarser), remove },
    },
    transaction,
  );
}

const idsOf = (banks: readonly PublicBank[]) =>
  banks.flatMap(({ checks }) => checks.map(({ checkId }) => checkId));

/** The banks of a class that is not safe any more, one level up, and so on as long as theirs is not. Pure. */
export function coarsen(
  banks: readonly PublicBank[],
  { identity, level: from }: Pick<PublicBank, 'identity' | 'level'>,
): { coarser: PublicBank[]; dropped: PublicBank[] } {
  const levels = new Map(banks.map(({ bank, level }) => [bank, level]));
  const now = () => banks.map((bank) => ({ ...bank, level: levels.get(bank.bank)! }));
  for (let level = from; level <= coarsestLevel; level += 1) {
    const group = now().filter((bank) => classOf(bank) === classOf({ identity, level }));
    if (group.length === 0 || isSafeGroup(group, protections)) break;
    for (const { bank } of group) levels.set(bank, level + 1);
  }
  const moved = now().filter(({ level }, place) => level !== banks[place]!.level);
  return {
    coarser: moved.filter(({ level }) => level <= coarsestLevel),
    dropped: moved.filter(({ level }) => level > coarsestLevel),
  };
}
