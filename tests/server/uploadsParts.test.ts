import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';

import { hashPassword } from '@/server/accounts/passwords';
import { Upload, User } from '@/server/db/models';

import { goodPassword } from '../support/accounts';
import { createBankOf, createCellType } from '../support/bankFixtures';
import { dischargeLog } from '../support/dischargeLog';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let other: TestClient;
let bankId: string;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
  other = await server.client('owner');
  bankId = await createBankOf(owner);
});
afterAll(() => server.stop());

const files = () => {
  const folder = join(server.deps.config.uploadsDir, 'files');
  return existsSync(folder) ? readdirSync(folder) : [];
};

async function send(contents: Record<string, string>, client = owner, bank = bankId) {
  const request = client.send('post', `/api/banks/${bank}/logs`);
  for (const [name, text] of Object.entries(contents)) request.attach('file', Buffer.from(text), name);
  return request;
}

async function readOut(contents: Record<string, string>, client = owner, bank = bankId) {
  const { status, body } = await send(contents, client, bank);
  expect(status).toBe(201);
  await server.deps.jobs.settle();
  return (await client.get(`/api/uploads/${body.id}`)).body;
}

/** A log cut in two: rows from `from` on, the header before them. */
function cut(text: string, from: number, to?: number): string {
  const [header, ...rows] = text.trim().split('\n');
  return [header, ...rows.slice(from, to)].join('\n') + '\n';
}

describe('a log in several files', () => {
  const { text, capacityAh } = dischargeLog();

  it('is kept as one upload and integrated as one, in the order of its stamps', async () => {
    const before = files().length;
    const read = await readOut({ 'second.csv': cut(text, 400), 'first.csv': cut(text, 0, 400) });
    expect(read).toMatchObject({ state: 'ready', filename: 'second.csv and 1 more', problem: null });
    expect(read.result.capacityAh).toBeCloseTo(capacityAh, 2);
    expect(files()).toHaveLength(before + 2);
  });

  it('says which file is the trouble', async () => {
    const read = await readOut({ 'first.csv': cut(text, 0, 400), 'notes.csv': 'Dear all,\nno log here.\n' });
    expect(read.state).toBe('failed');
    expect(read.problem).toMatch(/^notes\.csv: /);
    const refused = await send({ 'first.csv': text, 'meter.csv': '\u0000\u0001\u0002\u0003\u0004' });
    expect(refused.status).toBe(415);
    expect(refused.body.error.fields.file).toMatch(/^meter\.csv: /);
  });

  it('may be of six files and no more', async () => {
    const before = files().length;
    const seven = Object.fromEntries(Array.from({ length: 7 }, (_, index) => [`${index}.csv`, text]));
    const { status, body } = await send(seven);
    expect(status).toBe(400);
    expect(body.error.fields.file).toMatch(/At most 6 files/);
    expect(files()).toHaveLength(before);
    expect(readdirSync(join(server.deps.config.uploadsDir, 'tmp'))).toEqual([]);
  });

  it('goes whole when its account does', async () => {
    const leaver = await server.client('owner');
    const passwordHash = await hashPassword(goodPassword, server.deps.config.bcryptCost);
    await User.update({ passwordHash }, { where: { id: leaver.userId! } });
    const bank = await createBankOf(leaver);
    const before = files().length;
    await readOut({ 'a.csv': cut(text, 0, 400), 'b.csv': cut(text, 400) }, leaver, bank);
    expect(files()).toHaveLength(before + 2);
    const request = { currentPassword: goodPassword, checks: 'withdraw' };
    expect((await leaver.send('post', '/api/account/delete', request)).status).toBe(200);
    expect(files()).toHaveLength(before);
  });
});

describe('columns that were matched by hand', () => {
  const odd = (seconds: number) =>
    dischargeLog({ timeHeader: 'date', stamps: 'ambiguousDate', stepS: seconds }).text;

  it('are remembered for the next log with the same header, which says so', async () => {
    const unclear = await readOut({ 'a.csv': odd(20) });
    expect(unclear.state).toBe('unclear');
    const mapping = { ...unclear.recognised.mapping, timeFormat: 'dmy', window: null };
    await owner.send('put', `/api/uploads/${unclear.id}/mapping`, { mapping });
    await server.deps.jobs.settle();
    const next = await readOut({ 'b.csv': odd(10) });
    expect(next.state).toBe('ready');
    expect(next.recognised.mapping.timeFormat).toBe('dmy');
    expect(next.result.warnings.map(({ code }: { code: string }) => code)).toContain('columnsRemembered');
  });

  it('hold for their owner only', async () => {
    const bank = await createBankOf(other);
    expect((await readOut({ 'a.csv': odd(20) }, other, bank)).state).toBe('unclear');
  });

  it('are not remembered where only another part of the log was counted', async () => {
    const read = await readOut({ 'plain.csv': dischargeLog().text });
    const mapping = { ...read.recognised.mapping, window: { startS: 3600, endS: 7200 } };
    await owner.send('put', `/api/uploads/${read.id}/mapping`, { mapping });
    await server.deps.jobs.settle();
    expect((await Upload.findByPk(read.id as string))?.isMatched).toBe(false);
    const next = await readOut({ 'plain.csv': dischargeLog().text });
    expect(next.result.windowStartS).not.toBe(3600);
  });
});
