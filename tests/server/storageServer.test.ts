import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import type { Sequelize } from 'sequelize';

import { connect } from '@/server/db/connect';
import { migrate } from '@/server/db/migrate';
import { Upload, User } from '@/server/db/models';

import { bankInput, createCellType } from '../support/bankFixtures';
import { dischargeLog } from '../support/dischargeLog';
import {
  type FakeBucket,
  fakeBucketName,
  fakeCredentials,
  fakeRegion,
  startFakeBucket,
} from '../support/fakeBucket';
import { drawPicture } from '../support/pictures';
import {
  processConfig,
  type ServerProcess,
  signedInHeaders,
  startServerProcess,
} from '../support/serverProcess';

const dataDir = mkdtempSync(join(tmpdir(), 'ebbline-bucket-'));
const config = processConfig(dataDir);
let db: Sequelize;
let bucket: FakeBucket;
let server: ServerProcess;
let headers: Record<string, string>;
let bankId: string;

const startWithBucket = () =>
  startServerProcess(dataDir, {
    NODE_ENV: 'test',
    ...fakeCredentials,
    EBBLINE_S3_BUCKET: fakeBucketName,
    EBBLINE_S3_ENDPOINT: bucket.endpoint,
    EBBLINE_S3_REGION: fakeRegion,
  });

beforeAll(async () => {
  bucket = await startFakeBucket();
  db = await connect(config.databaseFile);
  await migrate(db);
  await createCellType();
  const { id: userId } = await User.create({
    ...{ email: 'owner@example.org', passwordHash: 'not-a-hash', role: 'owner', emailVerifiedAt: new Date() },
  });
  server = await startWithBucket();
  headers = await signedInHeaders(server, config, { userId, role: 'owner' });
  const answer = await fetch(`${server.url}/api/banks`, {
    method: 'POST',
    headers: { ...headers, 'content-type': 'application/json' },
    body: JSON.stringify(bankInput()),
  });
  bankId = ((await answer.json()) as { id: string }).id;
}, 60_000);

afterAll(async () => {
  await server.kill();
  await db.close();
  await bucket.stop();
  rmSync(dataDir, { recursive: true, force: true });
});

async function send(noun: 'logs' | 'photos', content: Uint8Array<ArrayBuffer> | string) {
  const form = new FormData();
  form.append('file', new Blob([content]), 'file');
  const answer = await fetch(`${server.url}/api/banks/${bankId}/${noun}`, {
    method: 'POST',
    headers,
    body: form,
  });
  return { status: answer.status, body: (await answer.json()) as { id: string } };
}

it('keeps a log in the bucket, and reads it from there in its thread', async () => {
  const { text, capacityAh } = dischargeLog();
  const { status, body } = await send('logs', text);
  expect(status).toBe(201);
  const stored = async () => Upload.findByPk(body.id, { rejectOnEmpty: true });
  while (['received', 'working'].includes((await stored()).state))
    await new Promise((resolve) => setTimeout(resolve, 50));
  const { state, problem, result, storageKey } = await stored();
  expect([state, problem]).toEqual(['ready', null]);
  expect(result?.capacityAh).toBeCloseTo(capacityAh, 2);
  expect(bucket.objects.get(`files/${storageKey}`)?.toString()).toBe(text);
  expect(
    bucket.requests.filter((request) => request.startsWith(`GET /${fakeBucketName}/files/`)),
  ).not.toEqual([]);
  expect(existsSync(join(config.uploadsDir, 'files'))).toBe(false);
}, 60_000);

it('keeps a photo there, shows it, and says so while the bucket does not answer', async () => {
  const { status, body } = await send('photos', new Uint8Array(await drawPicture().jpeg().toBuffer()));
  expect(status).toBe(201);
  const look = () => fetch(`${server.url}/api/photos/${body.id}/thumb`, { headers });
  const { thumbKey } = await Upload.findByPk(body.id, { rejectOnEmpty: true });
  const shown = Buffer.from(await (await look()).arrayBuffer());
  expect(shown.equals(bucket.objects.get(`files/${thumbKey}`)!)).toBe(true);

  bucket.failWith = 503;
  const refused = await look();
  expect(refused.status).toBe(503);
  expect(await refused.json()).toMatchObject({ error: { code: 'unavailable' } });
  bucket.failWith = null;
  expect((await look()).status).toBe(200);
}, 60_000);

it('takes nothing in while the bucket does not answer, and leaves no row', async () => {
  const rows = await Upload.count();
  bucket.failWith = 500;
  expect((await send('logs', dischargeLog().text)).status).toBe(503);
  expect((await send('photos', new Uint8Array(await drawPicture().jpeg().toBuffer()))).status).toBe(503);
  bucket.failWith = null;
  expect(await Upload.count()).toBe(rows);
}, 60_000);

it('sweeps from the bucket what no row knows, when it starts anew', async () => {
  const known = [...bucket.objects.keys()].sort();
  bucket.objects.set(`files/${'e'.repeat(32)}`, Buffer.from('orphan'));
  await server.kill();
  server = await startWithBucket();
  expect([...bucket.objects.keys()].sort()).toEqual(known);
}, 60_000);

it('starts while the bucket does not answer, and sweeps the next time', async () => {
  const known = [...bucket.objects.keys()].sort();
  bucket.objects.set(`files/${'e'.repeat(32)}`, Buffer.from('orphan'));
  await server.kill();
  bucket.failWith = 503;
  server = await startWithBucket();
  expect((await fetch(`${server.url}/api/cells`)).status).toBe(200);
  bucket.failWith = null;
  await server.kill();
  server = await startWithBucket();
  expect([...bucket.objects.keys()].sort()).toEqual(known);
}, 60_000);
