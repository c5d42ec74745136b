import { type EffectOutcome, type EffectTask, runEffectTask } from './effectTask';

/** Entry of the worker thread. */
export default function effectWorker(task: EffectTask): EffectOutcome {
  return runEffectTask(task);
}
