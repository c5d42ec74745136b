import { createWriteStream, existsSync } from 'node:fs';
import { mkdir, mkdtemp, open, rename, rm, stat, writeFile } from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { pipeline } from 'node:stream/promises';

import { QueryTypes, type Sequelize } from 'sequelize';
import { create } from 'tar';

import { hashOf } from '../uploads/hashOf';
import type { FileStorage } from '../uploads/storage';

import { BackupError, backupFormat, databaseName, filesName, type Manifest, manifestName } from './manifest';

/**
 * Writes database and uploaded files into one compressed archive, while the server runs. The database is copied first, in
 * one read (VACUUM INTO), so that every file it names is there to be copied after it; a file removed in between belonged
 * to what was deleted since, and is left out.
 * @throws BackupError when the file exists already
 */
export async function makeBackup(
  { db, storage, clock }: { db: Sequelize; storage: FileStorage; clock: () => Date },
  file: string,
): Promise<Manifest> {
  if (existsSync(file)) throw new BackupError(`There is a file at ${file} already.`);
  await mkdir(dirname(file), { recursive: true });
  const staging = await mkdtemp(join(dirname(file), '.making-'));
  try {
    const databaseFile = join(staging, databaseName);
    await db.query('VACUUM INTO ?', { replacements: [databaseFile] });
    await mkdir(join(staging, filesName));
    const manifest: Manifest = {
      format: backupFormat,
      createdAt: clock().toISOString(),
      migrations: await migrationsOf(db),
      database: { bytes: (await stat(databaseFile)).size, sha256: await hashOf(databaseFile) },
      files: await copyFiles(storage, join(staging, filesName)),
    };
    await writeFile(join(staging, manifestName), `${JSON.stringify(manifest, null, 1)}\n`);
    const half = join(staging, 'archive.tar.gz');
    await create({ gzip: true, portable: true, file: half, cwd: staging }, [
      manifestName,
      databaseName,
      filesName,
    ]);
    const handle = await open(half, 'r');
    await handle.sync().finally(() => handle.close());
    await rename(half, file);
    return manifest;
  } finally {
    await rm(staging, { recursive: true, force: true });
  }
}

async function migrationsOf(db: Sequelize): Promise<string[]> {
  const rows = await db.query<{ name: string }>('SELECT name FROM migrations ORDER BY name', {
    type: QueryTypes.SELECT,
  });
  return rows.map(({ name }) => name);
}

async function copyFiles(storage: FileStorage, folder: string): Promise<Manifest['files']> {
  const files: Manifest['files'] = [];
  for (const key of (await storage.keys()).sort()) {
    const path = join(folder, key);
    try {
      await pipeline(await storage.open(key), createWriteStream(path));
    } catch (error) {
      // Told apart from a failure by asking again: removed since the keys were listed.
      if ((await storage.keys()).includes(key)) throw error;
      await rm(path, { force: true });
      continue;
    }
    files.push({ key, bytes: (await stat(path)).size, sha256: await hashOf(path) });
  }
  return files;
}
