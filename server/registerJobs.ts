import type { Deps } from './deps';
import { sendQueuedMail } from './mail/sendQueuedMail';

/** Binds every kind of job to its handler; returns what closes the worker threads. */
export function registerJobs(deps: Deps): () => Promise<void> {
  deps.jobs.handle('sendMail', sendQueuedMail(deps));
  return async () => undefined;
}
