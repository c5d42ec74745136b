import Papa from 'papaparse';

import { checkSourcedFieldsSchema, conditionsSchema, readingSchema } from '@/lib/contract/checks';
import { Upload } from '@/server/db/models';

import { checkInput, createBankOf, createCellType } from '../support/bankFixtures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let checkId: string;
let bankId: string;
const note = '=HYPERLINK("https://elsewhere.example")';

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
  const other = await server.client('owner');
  await other.send(
    'post',
    `/api/banks/${await createBankOf(other, { name: 'Not theirs' })}/checks`,
    checkInput(),
  );
  bankId = await createBankOf(owner, { name: 'Barn, "left"' });
  await owner.send('post', `/api/banks/${bankId}/events`, {
    happenedOn: '2025-05-04',
    kind: 'rebalanced',
    note: 'Two weeks at 3.45 V',
  });
  await Upload.create({
    ownerId: owner.userId!,
    bankId,
    kind: 'log',
    filename: 'autumn.csv',
    storageKey: 'b'.repeat(32),
    sha256: 'a'.repeat(64),
    bytes: 12,
    state: 'ready',
  });
  checkId = (await owner.send('post', `/api/banks/${bankId}/checks`, checkInput({ note }))).body.id;
  const moderator = await server.client('moderator');
  await moderator.send('post', `/api/screening/${checkId}/decision`, {
    action: 'sendBack',
    version: 1,
    question: 'Which shunt was it?',
  });
  await owner.send('post', `/api/checks/${checkId}/answer`, { version: 2, answer: 'The one of 500 A' });
});
afterAll(() => server.stop());

describe('GET /api/account/own-data.json', () => {
  it('is a file of everything: account, banks, events, uploads, checks with sources and figures, their trail', async () => {
    const { status, headers, body } = await owner.get('/api/account/own-data.json');
    expect(status).toBe(200);
    expect(headers['content-disposition']).toBe('attachment; filename=ebbline-own-data-2026-12-01.json');
    expect(body.account).toMatchObject({ id: owner.userId, email: owner.email, role: 'owner' });
    expect(body.banks).toHaveLength(1);
    const [bank] = body.banks;
    expect(bank).toMatchObject({
      name: 'Barn, "left"',
      firstUseMonth: '2023-03',
      events: [{ kind: 'rebalanced', note: 'Two weeks at 3.45 V' }],
      uploads: [{ filename: 'autumn.csv', bytes: 12 }],
    });
    const [check] = bank.checks;
    const { reading, conditions, sources } = checkInput();
    expect(check).toMatchObject({ id: checkId, state: 'submitted', reading, conditions, sources, note });
    expect(check.computed.capacityRefAh).toBeCloseTo(264, 9);
    expect(check.trail.map(({ action, by, text }: Record<string, string>) => [action, by, text])).toEqual([
      ['submitted', 'owner', ''],
      ['sentBack', 'moderator', 'Which shunt was it?'],
      ['answered', 'owner', 'The one of 500 A'],
    ]);
    expect(check.trail[0].details).toMatchObject({ note, entered: { reading } });
  });

  it('tells nothing of others: no name of theirs, no id of the moderator, no pseudonym', async () => {
    const { text } = await owner.get('/api/account/own-data.json');
    expect(text).not.toContain('Not theirs');
    expect(text).not.toMatch(/actorId|pseudonym|passwordHash|storageKey/);
  });

  it('is for who is signed in', async () => {
    const visitor = await server.client();
    for (const path of ['/api/account/own-data.json', '/api/account/checks.csv'])
      expect((await visitor.get(path)).status).toBe(401);
  });

  it('is there for an account without banks too', async () => {
    const newcomer = await server.client('owner');
    expect((await newcomer.get('/api/account/own-data.json')).body.banks).toEqual([]);
    const lines = (await newcomer.get('/api/account/checks.csv')).text.trim().split('\r\n');
    expect(lines).toHaveLength(1);
  });
});

describe('GET /api/account/checks.csv', () => {
  it('has a line for each check and a column for each field and each source, and reads back as it was', async () => {
    const { status, headers, text } = await owner.get('/api/account/checks.csv');
    expect([status, headers['content-type']]).toEqual([200, 'text/csv; charset=utf-8']);
    const { data, meta, errors } = Papa.parse<Record<string, string>>(text, {
      header: true,
      skipEmptyLines: true,
    });
    expect(errors).toEqual([]);
    expect(data).toHaveLength(1);
    const asked = [...readingSchema.keyof().options, ...conditionsSchema.keyof().options];
    const sources = checkSourcedFieldsSchema.options.map((field) => `${field}Source`);
    expect(meta.fields).toEqual(
      expect.arrayContaining([...asked, ...sources, 'computed.sohFraction', 'note']),
    );
    const [row] = data;
    expect(row).toMatchObject({
      bankName: 'Barn, "left"',
      capacityAh: '264',
      capacityAhSource: 'metered',
      temperatureMeanCSource: 'readOff',
      testedOn: '2026-10-03',
      chargeIt: '',
    });
    expect(Number(row!['computed.sohFraction'])).toBeCloseTo(264 / 280, 9);
  });

  it('lets no spreadsheet take words for a formula, and leaves negative numbers alone', async () => {
    const bank = await createBankOf(owner, { name: '@SUM(A1)' });
    const cold = checkInput({ conditions: { temperatureColdestC: -4 }, reading: { testedOn: '2026-10-04' } });
    await owner.send('post', `/api/banks/${bank}/checks`, cold);
    const { text } = await owner.get('/api/account/checks.csv');
    const { data } = Papa.parse<Record<string, string>>(text, { header: true, skipEmptyLines: true });
    expect(data.map(({ note: words, bankName }) => [words, bankName])).toEqual([
      [`'${note}`, 'Barn, "left"'],
      ['', "'@SUM(A1)"],
    ]);
    expect(data[1]!.temperatureColdestC).toBe('-4');
  });
});
