import { readFile, stat, statfs } from 'node:fs/promises';
import { join } from 'node:path';

import type { Logger } from 'pino';
import { z } from 'zod';

import { instantSchema } from '@/lib/contract/fields';
import type { Health } from '@/lib/contract/steward';

import type { Config } from '../config';
import { Upload } from '../db/models';

/** Room on the disk of the data folder, and what the database and the files of owners take of it. */
export async function readStorage({ dataDir, databaseFile }: Config): Promise<Health['storage']> {
  const [disk, database, log, uploads, uploadBytes] = await Promise.all([
    statfs(dataDir),
    sizeOf(databaseFile),
    // What has been written since SQLite last tidied up stands in a file of its own.
    sizeOf(`${databaseFile}-wal`),
    Upload.count(),
    Upload.sum('bytes'),
  ]);
  return {
    diskFreeBytes: disk.bavail * disk.bsize,
    diskBytes: disk.blocks * disk.bsize,
    databaseBytes: database + log,
    uploads,
    uploadBytes: uploadBytes ?? 0,
  };
}

const sizeOf = (file: string) =>
  stat(file).then(
    ({ size }) => size,
    () => 0,
  );

/** Where a backup leaves word of itself, in the data folder. */
export const backupStamp = join('backups', 'last.json');

const stampSchema = z.object({ at: instantSchema, bytes: z.number().nonnegative().nullish() });

/** The last backup by the stamp it left; null when there is none that can be read. */
export async function readLastBackup({ dataDir }: Config, logger: Logger): Promise<Health['lastBackup']> {
  const text = await readFile(join(dataDir, backupStamp), 'utf8').catch(() => null);
  if (text === null) return null;
  try {
    const { at, bytes = null } = stampSchema.parse(JSON.parse(text));
    return { at, bytes };
  } catch (error) {
    logger.warn({ err: error }, 'the stamp of the last backup can’t be read');
    return null;
  }
}
