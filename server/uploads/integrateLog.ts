import { resolve } from 'node:path';
import { MessageChannel } from 'node:worker_threads';

import type { Piscina } from 'piscina';
import { z } from 'zod';

import { Upload } from '../db/models';
import type { Deps } from '../deps';
import type { JobHandler } from '../jobs/JobRunner';
import { createWorkerPool } from '../jobs/workerPool';
import { findMatched } from './matchedColumns';
import type { ReadOutcome } from './readLog';
import type { StorageSettings } from './storage';

const payloadSchema = z.object({ uploadId: z.uuid() });
/** A log of a million rows takes seconds; past this the worker is stopped. */
const timeoutMs = 120_000;
/** How often progress is written at most. */
const progressMs = 500;

const unreadable = 'This log could not be read. Try a smaller part of it, or type the figures.';

/**
 * Job: reads an upload in a worker thread and stores the outcome in one write. A second run, after a kill, starts over
 * and ends the same.
 */
export function createIntegrateLog(deps: Deps): { handler: JobHandler; close: () => Promise<void> } {
  const pool = createWorkerPool(resolve(__dirname, 'readLogWorker.ts'), deps.logger);
  return {
    async handler(payload) {
      const { uploadId } = payloadSchema.parse(payload);
      const upload = await Upload.findByPk(uploadId);
      if (!upload || upload.state === 'ready') return;
      await upload.update({ state: 'working', progressFraction: 0 });
      const outcome = await readInWorker(deps, pool, upload);
      await upload.update({ ...outcome, progressFraction: 1 });
    },
    close: () => pool.close(),
  };
}

async function readInWorker({ config, logger }: Deps, pool: Piscina, upload: Upload): Promise<ReadOutcome> {
  const { filename, storageKey, bytes, ownerId } = upload;
  const files = [{ filename, storageKey, bytes }, ...(upload.parts ?? [])];
  const matched = await findMatched(ownerId);
  const settled = upload.recognised?.questions.length === 0 ? upload.recognised : null;
  const store: StorageSettings = { uploadsDir: config.uploadsDir, bucket: config.bucket };
  const { port1, port2: port } = new MessageChannel();
  const progress = storeProgress(upload);
  port1.on('message', progress.report);
  try {
    return (await pool.run(
      { store, files, matched, settled, port },
      { transferList: [port], signal: AbortSignal.timeout(timeoutMs) },
    )) as ReadOutcome;
  } catch (error) {
    logger.error({ err: error, uploadId: upload.id }, 'a log could not be read');
    return { state: 'failed', recognised: settled, result: null, problem: unreadable };
  } finally {
    port1.close();
    await progress.settled();
  }
}

/** Writes progress now and then, one write at a time; `settled` waits for the last. */
function storeProgress({ id }: Upload) {
  let lastAt = performance.now();
  let writing: Promise<unknown> | undefined;
  return {
    report(progressFraction: number) {
      if (writing || performance.now() - lastAt < progressMs) return;
      lastAt = performance.now();
      writing = Upload.update({ progressFraction }, { where: { id } })
        .catch(() => undefined)
        .finally(() => (writing = undefined));
    },
    settled: async () => {
      await writing;
    },
  };
}
