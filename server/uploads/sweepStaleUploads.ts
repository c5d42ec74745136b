import { Upload } from '../db/models';
import type { Deps } from '../deps';
import { createLocalStorage } from './storage';

/**
 * Clears what a kill may have left: files half received, and files saved whose row was never committed. To be run at
 * start, before anything is received.
 */
export async function sweepStaleUploads({ config }: Pick<Deps, 'config'>): Promise<void> {
  const storage = createLocalStorage(config.uploadsDir);
  await storage.clearIncoming();
  const rows = await Upload.findAll({ attributes: ['storageKey'] });
  const known = new Set(rows.map(({ storageKey }) => storageKey));
  for (const key of await storage.keys()) if (!known.has(key)) await storage.remove(key);
}
