import type { Transaction } from 'sequelize';

import { PoolStep, PublicMember } from '../db/models';
import type { Deps } from '../deps';
import { appendTrail } from '../trail/appendTrail';
import { approvedMembers } from './approvedRows';
import { planStep } from './planStep';
import { publicMembers } from './publicMembers';

/**
 * Moves the public pool if enough owners' changes wait: members in and out with their rows as they stand, the step and
 * its entry in the trail, in the caller's transaction. Answers whether it moved.
 */
export async function publicStep({ clock }: Deps, transaction: Transaction): Promise<boolean> {
  const plan = planStep(await approvedMembers(transaction), await publicMembers(transaction));
  if (!plan) return false;
  const { put, remove, owners } = plan;
  const at = clock();
  const counts = { owners, added: put.length, removed: remove.length };
  const step = await PoolStep.create({ ...counts, createdAt: at }, { transaction });
  const replaced = [...remove, ...put.map(({ checkId }) => checkId)];
  await PublicMember.destroy({ where: { checkId: replaced }, transaction });
  await PublicMember.bulkCreate(
    put.map((member) => ({ ...member, stepId: step.id })),
    { transaction },
  );
  await appendTrail(
    {
      actor: 'system',
      at,
      subjectType: 'pool',
      subjectId: String(step.id),
      action: 'stepped',
      details: { ...counts, put: put.map(({ checkId }) => checkId), remove },
    },
    transaction,
  );
  return true;
}
