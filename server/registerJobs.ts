import type { Deps } from './deps';
import { sendQueuedMail } from './mail/sendQueuedMail';
import { createIntegrateLog } from './uploads/integrateLog';

/** Binds every kind of job to its handler; returns what closes the worker threads. */
export function registerJobs(deps: Deps): () => Promise<void> {
  deps.jobs.handle('sendMail', sendQueuedMail(deps));
  const integrateLog = createIntegrateLog(deps);
  deps.jobs.handle('integrateLog', integrateLog.handler);
  return () => integrateLog.close();
}
