import { Cron } from 'croner';
import type { Transaction } from 'sequelize';

import type { Deps } from '../deps';
import type { JobHandler } from '../jobs/JobRunner';

/** The morning in Europe and Africa, the small hours in the Americas, the evening in the far east. */
const everyMorning = new Cron('0 7 * * *', { timezone: 'UTC' });

/**
 * Puts the next tick into the jobs table, unless one waits there. Called at each start: a tick that came due while the
 * server was down is run then, and one only, however many days it was.
 */
export async function scheduleDailyTick(deps: Deps): Promise<void> {
  await deps.db.transaction((transaction) => enqueueNext(deps, transaction));
}

/** Job: puts the next tick into the table, then asks for what is done once a day. */
export function dailyTick(deps: Deps): JobHandler {
  return () =>
    deps.db.transaction(async (transaction) => {
      await enqueueNext(deps, transaction);
      await deps.jobs.enqueue({ kind: 'sendDueReminders', dedupeKey: 'sendDueReminders' }, transaction);
      await deps.jobs.enqueue({ kind: 'verifyTrail', dedupeKey: 'verifyTrail' }, transaction);
      await deps.jobs.enqueue({ kind: 'sweepAbandoned', dedupeKey: 'sweepAbandoned' }, transaction);
    });
}

async function enqueueNext({ clock, jobs }: Deps, transaction: Transaction): Promise<void> {
  const runAfter = everyMorning.nextRun(clock());
  if (!runAfter) throw new Error('the daily tick has no next time');
  await jobs.enqueue({ kind: 'dailyTick', dedupeKey: 'dailyTick', runAfter }, transaction);
}
