import { randomUUID } from 'node:crypto';
import { readdirSync } from 'node:fs';
import { join } from 'node:path';

import iconv from 'iconv-lite';
import type supertest from 'supertest';

import { Job, Upload } from '@/server/db/models';

import { createBankOf, createCellType } from '../support/bankFixtures';
import { dischargeLog } from '../support/dischargeLog';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let other: TestClient;
let visitor: TestClient;
let bankId: string;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
  other = await server.client('owner');
  visitor = await server.client();
  bankId = await createBankOf(owner);
});

afterAll(() => server.stop());

const send = (
  client: TestClient,
  content: Buffer | string,
  filename = 'log.csv',
  bank = bankId,
): supertest.Test =>
  client.send('post', `/api/banks/${bank}/logs`).attach('file', Buffer.from(content), filename);

const filesIn = (folder: string) => readdirSync(join(server.deps.config.uploadsDir, folder));

async function readOut(content: Buffer | string) {
  const { body, status } = await send(owner, content);
  expect(status).toBe(201);
  await server.deps.jobs.settle();
  return (await owner.get(`/api/uploads/${body.id}`)).body;
}

describe('POST /api/banks/:bankId/logs', () => {
  it('keeps the file, answers the upload as received, and reads it in the background', async () => {
    const log = dischargeLog();
    const { status, body } = await send(owner, log.text);
    expect(status).toBe(201);
    expect(body).toMatchObject({
      bankId,
      filename: 'log.csv',
      state: 'received',
      result: null,
      problem: null,
    });
    expect(body.bytes).toBe(Buffer.byteLength(log.text));
    await server.deps.jobs.settle();
    const read = (await owner.get(`/api/uploads/${body.id}`)).body;
    expect(read).toMatchObject({ state: 'ready', progressFraction: 1, problem: null });
    // Closed form of the trapezoid rule on a rectangle of 847 rows: see the log's maker.
    expect(read.result.capacityAh).toBeCloseTo(log.capacityAh, 2);
    expect(read.result.meanCurrentA).toBeCloseTo((56 * 847) / 848, 6);
    expect(read.result.series.timeS.length).toBeGreaterThan(10);
  }, 30_000);

  it.each<[string, Buffer]>([
    ['UTF-8 with a mark', iconv.encode(dischargeLog().text, 'utf8', { addBOM: true })],
    ['UTF-16 little end first', iconv.encode(dischargeLog().text, 'utf-16le', { addBOM: true })],
    ['UTF-16 big end first', iconv.encode(dischargeLog().text, 'utf-16be', { addBOM: true })],
    ['Windows-1252 with a degree sign', iconv.encode(dischargeLog().text, 'win1252')],
    ['UTF-8 with a degree sign', Buffer.from(dischargeLog().text)],
  ])('reads a log in %s', async (_what, content) => {
    const read = await readOut(content);
    expect(read.state).toBe('ready');
    expect(read.result.capacityAh).toBeCloseTo(dischargeLog().capacityAh, 2);
    expect(read.result.meanTemperatureC).toBeCloseTo(25, 6);
  });

  it('reads a log whose last line is cut, and says so', async () => {
    const { text } = dischargeLog();
    const read = await readOut(text.slice(0, text.lastIndexOf(',') - 12));
    expect(read.state).toBe('ready');
    expect(read.result.warnings.map(({ code }: { code: string }) => code)).toContain('truncatedLastLine');
  });

  it.each<[string, string | Buffer, number, string]>([
    ['an empty file', '', 422, 'invalid'],
    ['only a byte order mark', Buffer.from([0xef, 0xbb, 0xbf]), 422, 'invalid'],
  ])('refuses %s beside the file and keeps nothing', async (_what, content, wanted, code) => {
    const [rows, files] = [await Upload.count(), filesIn('files').length];
    const { status, body } = await send(owner, content);
    expect(status).toBe(wanted);
    expect(body.error.code).toBe(code);
    expect(body.error.fields.file).toMatch(/\w/);
    expect(await Upload.count()).toBe(rows);
    expect(filesIn('files')).toHaveLength(files);
    expect(filesIn('tmp')).toEqual([]);
  });

  it('refuses more than 64 MB with 413 and keeps nothing', async () => {
    const [rows, files] = [await Upload.count(), filesIn('files').length];
    const { status, body } = await send(owner, Buffer.alloc(64 * 1024 * 1024 + 1, '1,2\n'));
    expect(status).toBe(413);
    expect(body.error).toMatchObject({
      code: 'tooLarge',
      fields: { file: expect.stringContaining('64 MB') },
    });
    expect(await Upload.count()).toBe(rows);
    expect(filesIn('files')).toHaveLength(files);
    expect(filesIn('tmp')).toEqual([]);
  }, 30_000);

  it('answers a form without a file, or that is no form, with the field', async () => {
    const path = `/api/banks/${bankId}/logs`;
    const answers = [
      await owner.send('post', path).field('name', 'value'),
      await owner.send('post', path, { file: 'text' }),
      await owner.send('post', path),
    ];
    for (const { status, body } of answers) {
      expect(status).toBe(422);
      expect(body.error.fields).toHaveProperty('file');
    }
  });

  it('answers a broken form with 400', async () => {
    const path = `/api/banks/${bankId}/logs`;
    const type = 'multipart/form-data; boundary=abc';
    const cut = '--abc\r\ncontent-disposition: form-data; name="file"; filename="a.csv"\r\n\r\n1,2\r\n';
    const broken = await owner.send('post', path).set('content-type', type).send(cut);
    expect(broken.status).toBe(400);
    expect(filesIn('tmp')).toEqual([]);
  });

  it.each<[string, string, string]>([
    ['a path upwards', '../../../../etc/passwd', 'passwd'],
    ['a path of another system', 'C:\\Users\\someone\\log.csv', 'log.csv'],
    ['HTML', '<img src=x onerror=alert(1)>.csv', '<img src=x onerror=alert(1)>.csv'],
    ['a direction mark', 'log\u202Evsc.exe', 'logvsc.exe'],
    ['a very long name', `${'é'.repeat(300)}.csv`, 'é'.repeat(120)],
  ])('stores a file named with %s under a random key and a plain name', async (_what, filename, wanted) => {
    const { status, body } = await send(owner, dischargeLog().text, filename);
    expect(status).toBe(201);
    expect(body.filename).toBe(wanted);
    const upload = await Upload.findByPk(body.id as string);
    expect(upload?.storageKey).toMatch(/^[0-9a-f]{32}$/);
    expect(filesIn('files')).toContain(upload?.storageKey);
    expect(upload?.sha256).toMatch(/^[0-9a-f]{64}$/);
  });

  it("answers 404 for others' banks, without receiving the file, and 401 to visitors", async () => {
    expect((await send(other, 'a,b\n1,2\n')).status).toBe(404);
    expect((await send(visitor, 'a,b\n1,2\n')).status).toBe(401);
    expect((await send(owner, 'a,b\n1,2\n', 'log.csv', randomUUID())).status).toBe(404);
    expect(filesIn('tmp')).toEqual([]);
  });
});

describe('reading a log', () => {
  it.each<[string, string]>([
    ['prose', 'Dear all,\nthis is not a log.\nIt has words.\n'],
    ['a header and no rows', 'time,voltage (V),current (A)\n'],
    ['a table without times', 'voltage (V),current (A)\n51.2,-56\n51.1,-56\n51.0,-56\n'],
  ])('ends as failed with words for %s', async (_what, content) => {
    const read = await readOut(content);
    expect(read.state).toBe('failed');
    expect(read.problem).toMatch(/\w+ \w+/);
    expect(read.result).toBeNull();
  });

  it.each([
    ['prototype keys', '__proto__'],
    ['constructor', 'constructor'],
    ['a formula', '=cmd|"/c calc"!A1'],
    ['HTML', '<script>alert(1)</script>'],
  ])('takes %s in the header for text', async (_what, header) => {
    const { text, capacityAh } = dischargeLog({ extraHeader: header });
    const read = await readOut(text);
    expect(read.state).toBe('ready');
    expect(read.result.capacityAh).toBeCloseTo(capacityAh, 2);
    expect(({} as Record<string, unknown>).polluted).toBeUndefined();
  });

  it('asks what cannot be told, and reads on with the answer', async () => {
    const unclear = await readOut(dischargeLog({ timeHeader: 'date', stamps: 'ambiguousDate' }).text);
    expect(unclear.state).toBe('unclear');
    expect(unclear.recognised.questions).toMatchObject([{ field: 'timeFormat', choices: ['dmy', 'mdy'] }]);
    const mapping = { ...unclear.recognised.mapping, timeFormat: 'dmy' };
    const answer = await owner.send('put', `/api/uploads/${unclear.id}/mapping`, { mapping });
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({ state: 'received', result: null, recognised: { questions: [] } });
    await server.deps.jobs.settle();
    const read = (await owner.get(`/api/uploads/${unclear.id}`)).body;
    expect(read.state).toBe('ready');
    expect(read.result.capacityAh).toBeCloseTo(dischargeLog().capacityAh, 2);
    expect(read.result.firstStamp).toMatch(/^2026-04-03T/);
  });

  it('is done again when the server was killed in the middle of it, to the same end', async () => {
    const before = await readOut(dischargeLog().text);
    await Upload.update(
      { state: 'working', result: null, recognised: null, progressFraction: 0.4 },
      { where: { id: before.id } },
    );
    const job = await Job.findOne({
      where: { kind: 'integrateLog', state: 'done' },
      order: [['createdAt', 'DESC']],
    });
    await job!.update({ state: 'running', payload: { uploadId: before.id } });
    await server.deps.jobs.start();
    await server.deps.jobs.settle();
    expect((await owner.get(`/api/uploads/${before.id}`)).body).toEqual(before);
  });
});

describe('GET /api/uploads/:uploadId', () => {
  it("answers the owner; 404 for others', 401 to visitors", async () => {
    const { body } = await send(owner, dischargeLog().text);
    expect((await owner.get(`/api/uploads/${body.id}`)).status).toBe(200);
    expect((await other.get(`/api/uploads/${body.id}`)).status).toBe(404);
    expect((await (await server.client('moderator')).get(`/api/uploads/${body.id}`)).status).toBe(404);
    expect((await visitor.get(`/api/uploads/${body.id}`)).status).toBe(401);
    expect((await owner.get(`/api/uploads/${randomUUID()}`)).status).toBe(404);
    expect((await owner.get('/api/uploads/x')).status).toBe(404);
  });
});

describe('PUT /api/uploads/:uploadId/mapping', () => {
  it('reads a chosen window', async () => {
    const read = await readOut(dischargeLog().text);
    const mapping = { ...read.recognised.mapping, window: { startS: 3600, endS: 7200 } };
    await owner.send('put', `/api/uploads/${read.id}/mapping`, { mapping });
    await server.deps.jobs.settle();
    const again = (await owner.get(`/api/uploads/${read.id}`)).body;
    // One hour at 56 A.
    expect(again.result.capacityAh).toBeCloseTo(56, 6);
    expect(again.result).toMatchObject({ windowStartS: 3600, windowEndS: 7200 });
  });

  it.each<[string, object, string]>([
    ['no mapping', { mapping: undefined }, 'mapping'],
    ['a window the wrong way round', { window: { startS: 10, endS: 5 } }, 'mapping.window'],
    [
      'a column below the first',
      { columns: [{ index: -1, quantity: 'time', unit: '' }] },
      'mapping.columns.0.index',
    ],
    [
      'a quantity that is not known',
      { columns: [{ index: 0, quantity: '__proto__', unit: '' }] },
      'mapping.columns.0.quantity',
    ],
    ['no column of times', { columns: [{ index: 2, quantity: 'current', unit: 'A' }] }, 'mapping'],
    [
      'a unit of something else',
      {
        columns: [
          { index: 0, quantity: 'time', unit: '' },
          { index: 2, quantity: 'current', unit: 'kPa' },
        ],
      },
      'mapping',
    ],
    ['a time format that is not known', { timeFormat: 'constructor' }, 'mapping'],
  ])('answers %s with the field', async (_what, change, field) => {
    const read = await readOut(dischargeLog().text);
    const mapping = { ...read.recognised.mapping, ...change };
    const request = 'mapping' in change ? {} : { mapping };
    const { status, body } = await owner.send('put', `/api/uploads/${read.id}/mapping`, request);
    expect(status).toBe(422);
    expect(body.error.fields).toHaveProperty([field]);
    expect((await owner.get(`/api/uploads/${read.id}`)).body).toEqual(read);
  });

  it('waits for a reading in hand, and refuses a file that holds no table', async () => {
    const read = await readOut(dischargeLog().text);
    const { mapping } = read.recognised;
    await Upload.update({ state: 'working' }, { where: { id: read.id } });
    const early = await owner.send('put', `/api/uploads/${read.id}/mapping`, { mapping });
    expect([early.status, early.body.error.code]).toEqual([409, 'conflict']);
    const prose = await readOut('Dear all,\nthis is not a log.\nIt has words.\n');
    const hopeless = await owner.send('put', `/api/uploads/${prose.id}/mapping`, { mapping });
    expect([hopeless.status, hopeless.body.error.code]).toEqual([409, 'conflict']);
  });

  it("answers 404 for others' uploads and 401 to visitors", async () => {
    const read = await readOut(dischargeLog().text);
    const request = { mapping: read.recognised.mapping };
    expect((await other.send('put', `/api/uploads/${read.id}/mapping`, request)).status).toBe(404);
    expect((await visitor.send('put', `/api/uploads/${read.id}/mapping`, request)).status).toBe(401);
    expect((await owner.send('put', `/api/uploads/${randomUUID()}/mapping`, request)).status).toBe(404);
  });
});
