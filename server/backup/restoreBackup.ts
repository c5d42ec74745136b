import { existsSync } from 'node:fs';
import { mkdir, mkdtemp, readdir, rename, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';

import { QueryTypes, Sequelize, Transaction } from 'sequelize';
import { extract } from 'tar';

import { knownMigrations } from '../db/migrate';
import { hashOf } from '../uploads/hashOf';
import { type FileStorage, isKey } from '../uploads/storage';

import { BackupError, databaseName, filesName, type Manifest, manifestName, readManifest } from './manifest';

interface Place {
  dataDir: string;
  databaseFile: string;
}

export interface RestoreOptions {
  /** Move what is there aside instead of refusing. */
  isReplacing?: boolean;
  clock: () => Date;
}

/**
 * Puts a backup in the place of an empty exchange, or of one that is moved aside. Nothing is touched before the whole
 * archive has been unpacked and every checksum in it has held. The database comes last, so that a restore that breaks off
 * leaves no exchange that lacks files.
 * @throws BackupError for a damaged or newer backup, a place that is taken, a server that runs
 */
export async function restoreBackup(
  file: string,
  place: Place,
  storage: FileStorage,
  { isReplacing = false, clock }: RestoreOptions,
): Promise<{ manifest: Manifest; movedTo: string | null }> {
  if (!existsSync(file)) throw new BackupError(`There is no file at ${file}.`);
  const isTaken = existsSync(place.databaseFile);
  if (isTaken && !isReplacing)
    throw new BackupError(
      `There is an exchange at ${place.dataDir} already. Add --replace to move it aside first.`,
    );
  if (isTaken) await refuseWhileRunning(place.databaseFile);
  await mkdir(place.dataDir, { recursive: true });
  const staging = await mkdtemp(join(place.dataDir, '.restoring-'));
  try {
    await unpack(file, staging);
    const manifest = await readManifest(join(staging, manifestName));
    refuseUnknownMigrations(manifest);
    await verify(staging, manifest);
    const movedTo = isTaken ? await moveAside(place, clock()) : null;
    for (const { key } of manifest.files) await storage.save(join(staging, filesName, key), key);
    await rename(join(staging, databaseName), place.databaseFile);
    return { manifest, movedTo };
  } finally {
    // Unpacking that broke off may still be closing its files.
    await rm(staging, { recursive: true, force: true, maxRetries: 10, retryDelay: 50 });
  }
}

/** Only what a backup holds is unpacked, whatever else an archive may carry. */
async function unpack(file: string, folder: string): Promise<void> {
  const isOurs = (path: string) =>
    [manifestName, databaseName, `${filesName}/`].includes(path) ||
    (path.startsWith(`${filesName}/`) && isKey(path.slice(filesName.length + 1)));
  try {
    await extract({
      file,
      cwd: folder,
      strict: true,
      filter: (path, entry) => isOurs(path) && isPlain(entry),
    });
  } catch {
    throw new BackupError('This backup is damaged: the archive breaks off or can not be unpacked.');
  }
}

function isPlain(entry: object): boolean {
  return 'type' in entry && (entry.type === 'File' || entry.type === 'Directory');
}

function refuseUnknownMigrations(manifest: Manifest): void {
  const known = new Set(knownMigrations);
  if (manifest.migrations.some((name) => !known.has(name)))
    throw new BackupError('This backup was made by a newer version. Bring the program up to date first.');
}

async function verify(folder: string, { database, files }: Manifest): Promise<void> {
  const databaseFile = join(folder, databaseName);
  await verifyFile(databaseFile, database, 'the database');
  for (const entry of files) await verifyFile(join(folder, filesName, entry.key), entry, `file ${entry.key}`);
  const unpacked = existsSync(join(folder, filesName)) ? await readdir(join(folder, filesName)) : [];
  if (unpacked.length !== files.length)
    throw new BackupError('This backup is damaged: it holds files its list does not name.');
  await verifyDatabase(databaseFile);
}

async function verifyFile(path: string, wanted: { bytes: number; sha256: string }, what: string) {
  const isWhole =
    existsSync(path) && (await stat(path)).size === wanted.bytes && (await hashOf(path)) === wanted.sha256;
  if (!isWhole) throw new BackupError(`This backup is damaged: ${what} is not what was saved.`);
}

async function verifyDatabase(file: string): Promise<void> {
  const db = new Sequelize({ dialect: 'sqlite', storage: file, logging: false });
  try {
    const rows = await db.query<{ integrity_check: string }>('PRAGMA integrity_check', {
      type: QueryTypes.SELECT,
    });
    if (rows.length !== 1 || rows[0]?.integrity_check !== 'ok')
      throw new BackupError('This backup is damaged: the database in it is not whole.');
  } finally {
    await db.close();
  }
}

/** A server keeps its connection open, which an exclusive lock can't be had beside. */
async function refuseWhileRunning(databaseFile: string): Promise<void> {
  const db = new Sequelize({ dialect: 'sqlite', storage: databaseFile, logging: false });
  try {
    await db.query('PRAGMA locking_mode = EXCLUSIVE');
    await db.query(`BEGIN ${Transaction.TYPES.EXCLUSIVE}`);
    await db.query('ROLLBACK');
  } catch {
    throw new BackupError('The exchange is running. Stop it before a backup is restored over it.');
  } finally {
    await db.close();
  }
}

/** Everything of the exchange that was there, kept in a folder beside; backups stay where they are. */
async function moveAside({ dataDir, databaseFile }: Place, now: Date): Promise<string> {
  const aside = join(dataDir, `before-restore-${now.toISOString().replace(/[:.]/g, '-')}`);
  await mkdir(aside);
  for (const name of [databaseFile, `${databaseFile}-wal`, `${databaseFile}-shm`, join(dataDir, 'uploads')])
    if (existsSync(name)) await rename(name, join(aside, name.slice(dataDir.length + 1)));
  return aside;
}
