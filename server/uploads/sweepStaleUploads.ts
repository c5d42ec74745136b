import { ReleaseFile, Upload } from '../db/models';
import type { Deps } from '../deps';
import { keysOf } from './keysOf';
import { StorageError } from './storage';

/**
 * Clears what a kill may have left: files half received, and files saved whose row was never committed. To be run at
 * start, before anything is received. A store out of reach is no reason not to start: it is swept the next time.
 */
export async function sweepStaleUploads({
  storage,
  logger,
}: Pick<Deps, 'storage' | 'logger'>): Promise<void> {
  await storage.clearIncoming();
  const rows = await Upload.findAll({ attributes: ['storageKey', 'thumbKey', 'parts'] });
  const released = await ReleaseFile.findAll({ attributes: ['storageKey'] });
  const known = new Set([...rows.flatMap(keysOf), ...released.map((file) => file.storageKey)]);
  try {
    for (const key of await storage.keys()) if (!known.has(key)) await storage.remove(key);
  } catch (error) {
    if (!(error instanceof StorageError)) throw error;
    logger.error({ err: error }, 'files without a row could not be swept');
  }
}
