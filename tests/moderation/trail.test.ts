import { execFile } from 'node:child_process';
import { copyFileSync } from 'node:fs';
import { join, resolve } from 'node:path';

import sqlite3 from 'sqlite3';

import { TrailText } from '@/server/db/models';
import { appendTrail } from '@/server/trail/appendTrail';
import { verifyTrail } from '@/server/trail/verifyTrail';

import { startTestServer, type TestServer } from '../support/testServer';

let server: TestServer;
beforeEach(async () => {
  server = await startTestServer();
  for (let i = 1; i <= 5; i += 1) await append(i);
});
afterEach(() => server.stop());

const append = (i: number) =>
  server.deps.db.transaction((transaction) =>
    appendTrail(
      {
        ...{ actor: 'system', at: server.deps.clock(), subjectType: 'check', subjectId: `check ${i}` },
        ...{ action: 'approved', details: { version: i, reading: { capacityAh: 0.1 * i } } },
        texts: { note: `note ${i}` },
      },
      transaction,
    ),
  );

const run = (file: string) =>
  new Promise<{ code: number; out: string }>((done) => {
    const script = resolve(__dirname, '../../scripts/trail.ts');
    const command = ['--import', 'tsx', script, 'verify', '--database', file];
    execFile(process.execPath, command, { cwd: resolve(__dirname, '../..') }, (error, stdout, stderr) =>
      done({ code: typeof error?.code === 'number' ? error.code : 0, out: stdout + stderr }),
    );
  });

/** A copy of the database with its guards taken off and something done to it. */
async function tampered(statement: string): Promise<string> {
  await server.deps.db.query('PRAGMA wal_checkpoint(TRUNCATE)');
  const { databaseFile, dataDir } = server.deps.config;
  const copy = join(dataDir, 'copy.sqlite');
  copyFileSync(databaseFile, copy);
  const db = new sqlite3.Database(copy);
  await new Promise<void>((done, fail) =>
    db.exec(`DROP TRIGGER trailNoUpdate; DROP TRIGGER trailNoDelete; ${statement}`, (error) =>
      error ? fail(error) : done(),
    ),
  );
  await new Promise<void>((done) => db.close(() => done()));
  return copy;
}

it('is whole after entries of every kind, and stays so when a text is erased', async () => {
  expect(await verifyTrail()).toMatchObject({ entries: 5, problems: [] });
  await TrailText.destroy({ where: { trailId: 2 } });
  expect((await verifyTrail()).problems).toEqual([]);
});

it('can’t be changed through the database itself', async () => {
  const refused = { parent: { message: expect.stringMatching(/append-only/) } };
  for (const statement of [
    `UPDATE trail SET action = 'turnedAway' WHERE id = 2`,
    'DELETE FROM trail WHERE id = 5',
  ])
    await expect(server.deps.db.query(statement)).rejects.toMatchObject(refused);
});

it('the command says that a sound copy is whole', async () => {
  const { code, out } = await run(await tampered('SELECT 1;'));
  expect({ code, out }).toEqual({
    code: 0,
    out: expect.stringMatching(/^The trail is whole: 5 entries, sealed by [0-9a-f]{64}\.\n$/),
  });
});

it.each([
  ['a changed action', `UPDATE trail SET action = 'turnedAway' WHERE id = 3;`, /entry 3: its content/],
  [
    'a changed figure',
    `UPDATE trail SET details = replace(details, '0.2', '0.3') WHERE id = 2;`,
    /entry 2: its content/,
  ],
  [
    'a changed time',
    `UPDATE trail SET at = '2026-01-01 00:00:00.000 +00:00' WHERE id = 4;`,
    /entry 4: its content/,
  ],
  [
    'a deleted entry',
    'DELETE FROM trailTexts WHERE trailId = 3; DELETE FROM trail WHERE id = 3;',
    /entry 4: follows entry 2/,
  ],
  [
    'a text put in another’s mouth',
    `UPDATE trailTexts SET text = 'x' WHERE trailId = 5;`,
    /entry 5: its text "note"/,
  ],
])('the command finds %s in a tampered copy', async (_name, statement, message) => {
  const { code, out } = await run(await tampered(statement));
  expect(code).toBe(1);
  expect(out).toMatch(message);
  expect(out).toMatch(/NOT whole/);
});

it('the command refuses what it can’t read', async () => {
  expect(await run(join(server.deps.config.dataDir, 'nothing.sqlite'))).toMatchObject({ code: 2 });
});
