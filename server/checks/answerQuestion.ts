import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { Actor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { findOwnCheck } from './queries';
import { refuseUnlessOpen } from './refuseUnlessOpen';

/**
 * Answers a moderator's question without changing values: the check is submitted again.
 * @throws AppError notFound, alreadyDecided, conflict (nothing was asked), versionConflict
 */
export async function answerQuestion(
  deps: Deps,
  actor: Extract<Actor, { userId: string }>,
  checkId: string,
  { version, answer }: { version: number; answer: string },
): Promise<void> {
  await deps.db.transaction(async (transaction) => {
    const { check } = await findOwnCheck(actor, 'checks.update', checkId, transaction);
    refuseUnlessOpen(check);
    if (check.version !== version) throw new AppError('versionConflict');
    if (check.state !== 'sentBack') throw new AppError('conflict', 'Nothing is asked about this check.');
    await check.update({ state: 'submitted', version: version + 1 }, { transaction });
    const entry = { actor, at: deps.clock(), subjectType: 'check', subjectId: checkId } as const;
    await appendTrail({ ...entry, action: 'answered', details: {}, texts: { answer } }, transaction);
  });
}
