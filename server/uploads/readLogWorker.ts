import type { MessagePort } from 'node:worker_threads';

import type { RecognisedLog } from '@/lib/contract/uploads';

import { readLog, type ReadOutcome } from './readLog';
import { createLocalStorage } from './storage';

export interface ReadTask {
  uploadsDir: string;
  storageKey: string;
  bytes: number;
  settled: RecognisedLog | null;
  /** Told how far the reading is, 0..1. */
  port: MessagePort;
}

/** Entry of the worker thread. */
export default async function readLogWorker({ uploadsDir, port, ...task }: ReadTask): Promise<ReadOutcome> {
  const storage = createLocalStorage(uploadsDir);
  const outcome = await readLog({ ...task, storage, onProgress: (fraction) => port.postMessage(fraction) });
  port.close();
  return outcome;
}
