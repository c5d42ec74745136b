import { mkdtempSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { QueryTypes, type Sequelize } from 'sequelize';
import { create, extract } from 'tar';

import { makeBackup } from '@/server/backup/makeBackup';
import { manifestName } from '@/server/backup/manifest';
import { restoreBackup } from '@/server/backup/restoreBackup';
import { readConfig } from '@/server/config';
import { connect } from '@/server/db/connect';
import { createStorage } from '@/server/uploads/createStorage';
import { readWhole } from '@/server/uploads/storage';

import { addBank, addCellType, addCheck } from '../support/poolFixture';
import { startTestServer, type TestServer } from '../support/testServer';

let folder: string;
let server: TestServer;
let file: string;
const clock = () => new Date('2026-12-01T12:00:00Z');

beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), 'ebbline-backup-'));
  file = join(folder, 'saved', 'one.tar.gz');
  server = await startTestServer();
  await addCellType();
  const owner = await server.client('owner');
  const bank = await addBank({ ownerId: owner.userId! });
  await addCheck({ bankId: bank.id, years: 2, efc: 400, sohFraction: 0.97 });
});
afterEach(async () => {
  await server.stop();
  rmSync(folder, { recursive: true, force: true });
});

const newPlace = (name = 'restored') => {
  const config = readConfig({ NODE_ENV: 'test', EBBLINE_DATA_DIR: join(folder, name) });
  return { config, storage: createStorage(config) };
};

/** Every row of every table, in a fixed order. */
async function allRows(db: Sequelize): Promise<Record<string, unknown[]>> {
  const tables = await db.query<{ name: string }>(
    "SELECT name FROM sqlite_master WHERE type = 'table' AND name NOT LIKE 'sqlite_%' ORDER BY name",
    { type: QueryTypes.SELECT },
  );
  const rows: Record<string, unknown[]> = {};
  for (const { name } of tables)
    rows[name] = await db.query(`SELECT * FROM "${name}" ORDER BY rowid`, { type: QueryTypes.SELECT });
  return rows;
}

async function restoredRows(databaseFile: string) {
  const db = await connect(databaseFile);
  try {
    return await allRows(db);
  } finally {
    await db.close();
  }
}

/** The archive with one of its parts changed. */
async function tampered(change: (unpacked: string) => void): Promise<string> {
  await makeBackup(server.deps, file);
  const unpacked = mkdtempSync(join(folder, 'unpacked-'));
  await extract({ file, cwd: unpacked });
  change(unpacked);
  const changed = join(folder, 'changed.tar.gz');
  await create({ gzip: true, file: changed, cwd: unpacked }, readdirSync(unpacked));
  return changed;
}

const restoring = (from: string, options: { isReplacing?: boolean } = {}) => {
  const { config, storage } = newPlace();
  return restoreBackup(from, config, storage, { clock, ...options });
};

describe('backup and restore', () => {
  it('brings every row of every table and every uploaded file back', async () => {
    const content = Buffer.from('what an owner sent');
    const key = await server.deps.storage.write(content);
    const before = await allRows(server.deps.db);
    await makeBackup(server.deps, file);
    const { config, storage } = newPlace();
    await restoreBackup(file, config, storage, { clock });
    const after = await restoredRows(config.databaseFile);
    // What is compared is not empty, so that the comparison can fail.
    expect(before.checks).toHaveLength(1);
    expect(after).toEqual(before);
    expect(await storage.keys()).toEqual([key]);
    expect(await readWhole(storage, key)).toEqual(content);
  });

  it('is one moment of the database while others write', async () => {
    let isWriting = true;
    const writing = (async () => {
      for (let i = 0; isWriting; i++)
        await server.deps.db.transaction(async (transaction) => {
          // Two rows that belong together: a copy that caught one of them alone would be torn.
          for (const side of ['left', 'right'])
            await server.deps.db.query(
              `INSERT INTO cellTypes (id, maker, name, format, ratedAh, nominalV, status, createdAt, updatedAt)
               SELECT ?, maker, ?, format, ratedAh, nominalV, status, createdAt, updatedAt FROM cellTypes LIMIT 1`,
              { replacements: [`${side}-${i}`, `${side}-${i}`], transaction },
            );
        });
    })();
    for (let i = 0; i < 3; i++) await makeBackup(server.deps, `${file}-${i}`);
    isWriting = false;
    await writing;
    for (let i = 0; i < 3; i++) {
      const { config, storage } = newPlace(`at-${i}`);
      await restoreBackup(`${file}-${i}`, config, storage, { clock });
      const { cellTypes = [] } = await restoredRows(config.databaseFile);
      expect(cellTypes.length % 2).toBe(1);
    }
  });

  it('does not write over a file', async () => {
    await makeBackup(server.deps, file);
    const size = statSync(file).size;
    await expect(makeBackup(server.deps, file)).rejects.toThrow('There is a file at');
    expect(statSync(file).size).toBe(size);
  });

  it('leaves no half file behind when it fails', async () => {
    const storage = {
      ...server.deps.storage,
      keys: async () => ['0'.repeat(32)],
      open: () => Promise.reject(new Error('the disk is gone')),
    };
    await expect(makeBackup({ ...server.deps, storage }, file)).rejects.toThrow('the disk is gone');
    expect(readdirSync(join(folder, 'saved'))).toEqual([]);
  });
});

describe('a restore is refused', () => {
  it.each([
    ['where a byte of the database was changed', (at: string) => flip(join(at, 'ebbline.sqlite'))],
    ['where the database is missing', (at: string) => rmSync(join(at, 'ebbline.sqlite'))],
    ['where the list is missing', (at: string) => rmSync(join(at, manifestName))],
    [
      'where a file was put in that the list does not name',
      (at: string) => writeFileSync(join(at, 'files', 'a'.repeat(32)), 'x'),
    ],
  ])('%s', async (_, change) => {
    await expect(restoring(await tampered(change))).rejects.toThrow(/damaged|no backup/);
    expect(readdirSync(newPlace().config.dataDir)).toEqual([]);
  });

  it('where the archive breaks off', async () => {
    await makeBackup(server.deps, file);
    const cut = join(folder, 'cut.tar.gz');
    writeFileSync(cut, readFileSync(file).subarray(0, statSync(file).size / 2));
    await expect(restoring(cut)).rejects.toThrow('damaged');
  });

  it('where it is something else', async () => {
    writeFileSync(file.replace('saved/', ''), 'a letter');
    await expect(restoring(file.replace('saved/', ''))).rejects.toThrow('damaged');
    await expect(restoring(join(folder, 'nothing.tar.gz'))).rejects.toThrow('There is no file');
  });

  it.each([
    ['its layout', (list: { format: number }) => (list.format = 99)],
    ['its database', (list: { migrations: string[] }) => list.migrations.push('9999-from-the-future')],
  ])('where a newer version made it, by %s', async (_, change) => {
    const changed = await tampered((at) => {
      const path = join(at, manifestName);
      const list = JSON.parse(readFileSync(path, 'utf8'));
      change(list);
      writeFileSync(path, JSON.stringify(list));
    });
    await expect(restoring(changed)).rejects.toThrow('newer version');
  });

  it('where an exchange is, until it is told to move that aside; never while that one runs', async () => {
    await makeBackup(server.deps, file);
    const { config } = server.deps;
    const again = (isReplacing: boolean) =>
      restoreBackup(file, config, server.deps.storage, { isReplacing, clock });
    await expect(again(false)).rejects.toThrow('--replace');
    await expect(again(true)).rejects.toThrow('running');

    const { config: place } = newPlace();
    await restoring(file);
    await expect(restoring(file)).rejects.toThrow('--replace');
    const { movedTo } = await restoring(file, { isReplacing: true });
    expect(readdirSync(movedTo!)).toContain('ebbline.sqlite');
    expect(await restoredRows(place.databaseFile)).toEqual(await allRows(server.deps.db));
  });
});

function flip(path: string): void {
  const bytes = readFileSync(path);
  bytes[bytes.length >> 1]! ^= 1;
  writeFileSync(path, bytes);
}
