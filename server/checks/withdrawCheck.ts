import type { Deps } from '../deps';
import { AppError } from '../errors';
import { requestRefit } from '../fits/requestRefit';
import type { Actor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { findOwnCheck, standingStates } from './queries';
import { rescreenOpenChecks } from './rescreenOpenChecks';

/**
 * Takes a check out of the exchange at its owner's wish. One that was approved leaves the pool with the next fit.
 * @throws AppError notFound, conflict (it does not stand any more), versionConflict
 */
export async function withdrawCheck(
  deps: Deps,
  actor: Extract<Actor, { userId: string }>,
  checkId: string,
  { version }: { version: number },
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const { check, bank } = await findOwnCheck(actor, 'checks.update', checkId, transaction);
    const { state } = check;
    if (!standingStates.some((standing) => standing === state))
      throw new AppError('conflict', 'This check is not part of the exchange any more.');
    if (check.version !== version) throw new AppError('versionConflict');
    await check.update({ state: 'withdrawn', version: version + 1 }, { transaction });
    const entry = { actor, at: deps.clock(), subjectType: 'check', subjectId: checkId } as const;
    await appendTrail({ ...entry, action: 'withdrawn', details: { from: state } }, transaction);
    await rescreenOpenChecks(deps, bank.id, transaction);
    if (state === 'approved') await requestRefit(deps, transaction);
  });
}
