import { readFile } from 'node:fs/promises';

import { z } from 'zod';

/** Raised when the layout of a backup changes; older ones stay readable. */
export const backupFormat = 1;
export const manifestName = 'manifest.json';
export const databaseName = 'ebbline.sqlite';
export const filesName = 'files';

const sha256Schema = z.string().regex(/^[0-9a-f]{64}$/);

const manifestSchema = z.object({
  format: z.number().int().min(1),
  createdAt: z.iso.datetime(),
  /** Names of the migrations the database has gone through. */
  migrations: z.array(z.string()),
  database: z.object({ bytes: z.number().int(), sha256: sha256Schema }),
  files: z.array(
    z.object({ key: z.string().regex(/^[0-9a-f]{32}$/), bytes: z.number().int(), sha256: sha256Schema }),
  ),
});
export type Manifest = z.infer<typeof manifestSchema>;

/** A backup that can't be used, in words for the person who restores. */
export class BackupError extends Error {
  constructor(message: string) {
    super(message);
    this.name = 'BackupError';
  }
}

/** @throws BackupError when the list is missing, not a list, or made by a newer version */
export async function readManifest(path: string): Promise<Manifest> {
  let content: unknown;
  try {
    content = JSON.parse(await readFile(path, 'utf8'));
  } catch {
    throw new BackupError('This is no backup of the exchange: it has no readable list of what it holds.');
  }
  const format = z.object({ format: z.number() }).safeParse(content);
  if (format.success && format.data.format > backupFormat)
    throw new BackupError('This backup was made by a newer version. Bring the program up to date first.');
  const parsed = manifestSchema.safeParse(content);
  if (!parsed.success) throw new BackupError('This backup is damaged: its list of contents can not be read.');
  return parsed.data;
}
