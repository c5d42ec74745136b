import { TrailCheck, TrailEntry } from '../db/models';
import type { Deps } from '../deps';
import type { JobHandler } from '../jobs/JobRunner';
import { verifyTrail } from '../trail/verifyTrail';

/** What is wrong is written down up to here; more tells nothing more. */
const mostProblems = 100;

/**
 * Job: walks along the trail and stores what it finds. The last entry of the walk before must still be there: a chain
 * whose end was cut off is whole in itself.
 */
export function checkTrail({ clock, logger }: Deps): JobHandler {
  return async () => {
    const startedAt = performance.now();
    const before = await TrailCheck.findOne({ order: [['id', 'DESC']] });
    const { entries, lastHash, problems } = await verifyTrail();
    if (before && before.lastHash !== '' && !(await isThere(before.lastHash)))
      problems.push({
        id: before.entries,
        problem: 'the last entry of the check before this one is not there any more',
      });
    if (problems.length > 0) logger.error({ problems: problems.slice(0, 3) }, 'the trail is not whole');
    await TrailCheck.create({
      ...{ entries, lastHash, problems: problems.slice(0, mostProblems) },
      ...{ durationMs: performance.now() - startedAt, checkedAt: clock() },
    });
  };
}

const isThere = async (hash: string) => (await TrailEntry.count({ where: { hash } })) > 0;

/** Asks for a walk along the trail; requests that still wait are one. */
export async function requestTrailCheck({ db, jobs }: Deps): Promise<void> {
  await db.transaction((transaction) =>
    jobs.enqueue({ kind: 'verifyTrail', dedupeKey: 'verifyTrail' }, transaction),
  );
}
