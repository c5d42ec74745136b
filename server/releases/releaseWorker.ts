import { type ReleaseOutcome, type ReleaseTask, runReleaseTask } from './releaseTask';

/** Entry of the worker thread. */
export default function releaseWorker(task: ReleaseTask): ReleaseOutcome {
  return runReleaseTask(task);
}
