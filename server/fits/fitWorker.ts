import { type FitOutcome, type FitTask, runFitTask } from './fitTask';

/** Entry of the worker thread. */
export default function fitWorker(task: FitTask): FitOutcome {
  return runFitTask(task);
}
