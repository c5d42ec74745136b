import { mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { request } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import type { Sequelize } from 'sequelize';

import { connect } from '@/server/db/connect';
import { migrate } from '@/server/db/migrate';
import { Bank, Upload, User } from '@/server/db/models';

import { bankInput, createCellType } from '../support/bankFixtures';
import { dischargeLog } from '../support/dischargeLog';
import {
  processConfig,
  type ServerProcess,
  signedInHeaders,
  startServerProcess,
} from '../support/serverProcess';

const dataDir = mkdtempSync(join(tmpdir(), 'ebbline-kill-'));
const config = processConfig(dataDir);
const bankFields = {
  madeMonth: null,
  startCapacityAh: null,
  clampForceN: null,
  clampTorqueNm: null,
  spacingMm: null,
};
const limitFields = { chargeLimitV: null, dischargeLimitV: null, bmsHighTripV: null, bmsLowTripV: null };
const restFields = {
  place: null,
  climateBand: null,
  priceMinor: null,
  priceCurrency: null,
  priceMonth: null,
  sources: {},
};
let db: Sequelize;
let userId: string;
let bankId: string;
let server: ServerProcess;

beforeAll(async () => {
  db = await connect(config.databaseFile);
  await migrate(db);
  await createCellType();
  const user = await User.create({ email: 'owner@example.org', passwordHash: 'not-a-hash', role: 'owner' });
  userId = user.id;
  const fields = { ...bankInput(), ...bankFields, ...limitFields, ...restFields };
  bankId = (await Bank.create({ ...fields, ownerId: userId, pseudonym: 'CDFGH' })).id;
}, 60_000);

afterAll(async () => {
  await server.kill();
  await db.close();
  rmSync(dataDir, { recursive: true, force: true });
});

const namesIn = (folder: string) => readdirSync(join(config.uploadsDir, folder));
const headers = () => signedInHeaders(server, config, { userId, role: 'owner' });

async function until(isTrue: () => Promise<boolean> | boolean): Promise<void> {
  while (!(await isTrue())) await new Promise((resolve) => setTimeout(resolve, 20));
}

const formStart = '--abc\r\ncontent-disposition: form-data; name="file"; filename="log.csv"\r\n\r\n';
const formEnd = '\r\n--abc--\r\n';

it('leaves nothing of an upload when the server is killed in the middle of it', async () => {
  server = await startServerProcess(dataDir);
  const upload = request(`${server.url}/api/banks/${bankId}/logs`, {
    method: 'POST',
    headers: { ...(await headers()), 'content-type': 'multipart/form-data; boundary=abc' },
  });
  upload.on('error', () => undefined);
  upload.write(formStart + dischargeLog().text);
  await until(() => namesIn('tmp').length === 1);
  await server.kill();
  expect(namesIn('tmp')).toHaveLength(1);
  server = await startServerProcess(dataDir);
  expect(namesIn('tmp')).toEqual([]);
  expect(namesIn('files')).toEqual([]);
  expect(await Upload.count()).toBe(0);
}, 120_000);

it('leaves nothing of an upload when its sender goes away', async () => {
  const upload = request(`${server.url}/api/banks/${bankId}/logs`, {
    method: 'POST',
    headers: { ...(await headers()), 'content-type': 'multipart/form-data; boundary=abc' },
  });
  upload.on('error', () => undefined);
  upload.write(formStart + dischargeLog().text);
  await until(() => namesIn('tmp').length === 1);
  upload.destroy();
  await until(() => namesIn('tmp').length === 0);
  expect(await Upload.count()).toBe(0);
}, 60_000);

it('reads an acknowledged log after the server was killed while reading it', async () => {
  const { text, capacityAh } = dischargeLog({ stepS: 0.05 });
  const answer = await fetch(`${server.url}/api/banks/${bankId}/logs`, {
    method: 'POST',
    headers: { ...(await headers()), 'content-type': 'multipart/form-data; boundary=abc' },
    body: formStart + text + formEnd,
  });
  expect(answer.status).toBe(201);
  const { id } = (await answer.json()) as { id: string };
  const stateOf = async () => (await Upload.findByPk(id))?.state;
  await until(async () => (await stateOf()) === 'working');
  await server.kill();
  expect(await stateOf()).toBe('working');
  server = await startServerProcess(dataDir);
  await until(async () => !['received', 'working'].includes((await stateOf())!));
  const upload = await Upload.findByPk(id);
  expect(upload?.state).toBe('ready');
  expect(upload?.result?.capacityAh).toBeCloseTo(capacityAh, 3);
  expect(namesIn('files')).toEqual([upload?.storageKey]);
}, 120_000);

it('removes a file whose row was never committed, and keeps the others', async () => {
  const before = namesIn('files');
  writeFileSync(join(config.uploadsDir, 'files', 'f'.repeat(32)), 'orphan');
  await server.kill();
  server = await startServerProcess(dataDir);
  expect(namesIn('files')).toEqual(before);
}, 120_000);
