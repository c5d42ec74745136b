import type { MessagePort } from 'node:worker_threads';

import type { RecognisedLog } from '@/lib/contract/uploads';

import { createStorage } from './createStorage';
import type { MatchedColumns } from './matchedColumns';
import { readLog, type ReadOutcome, type StoredFile } from './readLog';
import { StorageError, type StorageSettings } from './storage';

export interface ReadTask {
  store: StorageSettings;
  files: readonly [StoredFile, ...StoredFile[]];
  settled: RecognisedLog | null;
  matched: readonly MatchedColumns[];
  /** Told how far the reading is, 0..1. */
  port: MessagePort;
}

const outOfReach =
  'The file could not be fetched from where it is kept. Upload it again, or type the figures.';

/** Entry of the worker thread. */
export default async function readLogWorker({ store, port, ...task }: ReadTask): Promise<ReadOutcome> {
  const storage = createStorage(store);
  try {
    return await readLog({ ...task, storage, onProgress: (fraction) => port.postMessage(fraction) });
  } catch (error) {
    if (!(error instanceof StorageError)) throw error;
    return { state: 'failed', recognised: task.settled, result: null, problem: outOfReach };
  } finally {
    storage.close();
    port.close();
  }
}
