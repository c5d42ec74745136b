import { Op, type Transaction } from 'sequelize';

import type { ChecksAfterwards } from '@/lib/contract/accounts';

import { rescreenOpenChecks } from '../checks/rescreenOpenChecks';
import { Check } from '../db/models';
import type { Deps } from '../deps';
import { requestRefit } from '../fits/requestRefit';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';

/** What can't stay when nobody is there to go on with it. */
const unfinished = ['draft', 'sentBack'] as const;
const standing = [...unfinished, 'submitted', 'approved'] as const;

/**
 * Takes the checks of banks out of the exchange: all that stand, or, when they are left, those that wait for their
 * owner. Approved ones leave the pool with the next fit.
 */
export async function withdrawChecks(
  deps: Deps,
  actor: SignedInActor,
  { bankIds, afterwards }: { bankIds: string[]; afterwards: ChecksAfterwards },
  transaction: Transaction,
): Promise<void> {
  const states = afterwards === 'withdraw' ? standing : unfinished;
  const checks = await Check.findAll({
    where: { bankId: bankIds, state: { [Op.in]: [...states] } },
    order: [['id', 'ASC']],
    transaction,
  });
  const wasApproved = checks.some(({ state }) => state === 'approved');
  for (const check of checks) {
    const from = check.state;
    await check.update({ state: 'withdrawn', version: check.version + 1 }, { transaction });
    const entry = { actor, at: deps.clock(), subjectType: 'check', subjectId: check.id } as const;
    await appendTrail({ ...entry, action: 'withdrawn', details: { from } }, transaction);
  }
  for (const bankId of new Set(checks.map(({ bankId }) => bankId)))
    await rescreenOpenChecks(deps, bankId, transaction);
  if (wasApproved) await requestRefit(deps, transaction);
}
