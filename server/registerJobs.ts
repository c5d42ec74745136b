import { recomputeChecks } from './catalogue/recomputeChecks';
import type { Deps } from './deps';
import { createRefit } from './fits/refit';
import { sendQueuedMail } from './mail/sendQueuedMail';
import { closeEffects } from './moderation/findEffect';
import { settleDecision } from './moderation/settleDecision';
import { createMakeRelease } from './releases/makeRelease';
import { dailyTick } from './reminders/dailyTick';
import { sendDueReminders } from './reminders/sendDueReminders';
import { checkTrail } from './steward/checkTrail';
import { createIntegrateLog } from './uploads/integrateLog';
import { sweepAbandoned } from './uploads/sweepAbandoned';

/** Binds every kind of job to its handler; returns what closes the worker threads. */
export function registerJobs(deps: Deps): () => Promise<void> {
  deps.jobs.handle('sendMail', sendQueuedMail(deps));
  deps.jobs.handle('settleDecision', settleDecision(deps));
  deps.jobs.handle('recomputeChecks', recomputeChecks(deps));
  deps.jobs.handle('verifyTrail', checkTrail(deps));
  deps.jobs.handle('dailyTick', dailyTick(deps));
  deps.jobs.handle('sendDueReminders', sendDueReminders(deps));
  deps.jobs.handle('sweepAbandoned', sweepAbandoned(deps));
  const integrateLog = createIntegrateLog(deps);
  deps.jobs.handle('integrateLog', integrateLog.handler);
  const release = createMakeRelease(deps);
  deps.jobs.handle('makeRelease', release.handler);
  const refit = createRefit(deps);
  deps.jobs.handle('refit', refit.handler);
  return async () => {
    await integrateLog.close();
    await release.close();
    await refit.close();
    await closeEffects(deps);
  };
}
