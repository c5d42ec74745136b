import { readdirSync } from 'node:fs';
import { join } from 'node:path';

import { QueryTypes } from 'sequelize';

import { Bank, CellType, Check, Job, Session, TrailEntry, TrailText, Upload, User } from '@/server/db/models';
import { approvedRows } from '@/server/pool/approvedRows';
import { textDigest, trailHash } from '@/server/trail/appendTrail';

import { createAccount, goodPassword, signInAs } from '../support/accounts';
import { bankInput, checkInput, createCellType } from '../support/bankFixtures';
import { type Browser, openBrowser } from '../support/browser';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

const words = {
  name: 'Wendelins Scheune',
  eventNote: 'Nachbar half beim Balancieren',
  checkNote: 'Kellerraum hinter der Treppe',
  answer: 'Der Shunt vom Bootssteg',
  filename: 'wendelins-log.csv',
};
const log = ['time_s,voltage_V,current_A', ...Array.from({ length: 60 }, (_, i) => `${i * 60},52,-50`)].join(
  '\n',
);

// Logs are read and pools fitted by worker threads, which take their time to start.
jest.setTimeout(60_000);

let server: TestServer;
let moderator: TestClient;
let browser: Browser;
let user: User;
let bankId: string;
let approved: string;
let askedBack: string;
let waiting: string;
let count = 0;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  moderator = await server.client('moderator');
});
afterAll(() => server.stop());
beforeEach(async () => {
  count += 1;
  user = await createAccount(server, `wendelin${count}@example.org`);
  browser = await openBrowser(server.app);
  await signInAs(browser, user.email);
  await fillAccount();
});

async function submit(testedOn: string, more: Parameters<typeof checkInput>[0] = {}): Promise<string> {
  const check = checkInput({ ...more, reading: { testedOn } });
  const { status, body } = await browser.post(`/api/banks/${bankId}/checks`, check);
  expect([status, body.error]).toEqual([201, undefined]);
  return body.id;
}

async function decide(checkId: string, decision: object) {
  const check = await Check.findByPk(checkId, { rejectOnEmpty: true });
  const path = `/api/screening/${checkId}/decision`;
  const { status } = await moderator.send('post', path, { version: check.version, ...decision });
  expect(status).toBe(200);
}

/** An account that has left its words everywhere words can be left. */
async function fillAccount() {
  bankId = (await browser.post('/api/banks', bankInput({ name: words.name }))).body.id;
  await CellType.update({ proposedById: user.id }, { where: { id: 'gannet-280' } });
  const event = { happenedOn: '2025-05-04', kind: 'rebalanced', note: words.eventNote };
  await browser.post(`/api/banks/${bankId}/events`, event);
  const uploaded = await browser.attach(`/api/banks/${bankId}/logs`, log, words.filename);
  expect(uploaded.status).toBe(201);
  await server.deps.jobs.settle();
  const uploadId = (await Upload.findOne({ where: { bankId, state: 'ready' }, rejectOnEmpty: true })).id;
  approved = await submit('2024-10-03', { note: words.checkNote, conditions: { counterValue: 300 } });
  askedBack = await submit('2025-10-03', { uploadId, conditions: { counterValue: 500 } });
  waiting = await submit('2026-10-03', { note: words.checkNote });
  await decide(askedBack, { action: 'sendBack', question: 'Which meter?' });
  const { version } = await Check.findByPk(askedBack, { rejectOnEmpty: true });
  await browser.post(`/api/checks/${askedBack}/answer`, { version, answer: words.answer });
  await decide(askedBack, { action: 'sendBack', question: 'And its class?' });
  await decide(approved, { action: 'approve' });
  await browser.post('/api/account/change-email', {
    email: `elsewhere-wendelin${count}@example.org`,
    currentPassword: goodPassword,
  });
  await browser.post('/api/account/request-reset', { email: user.email });
}

const erase = (checks: string, currentPassword = goodPassword, from = browser) =>
  from.post('/api/account/delete', { currentPassword, checks });
const stateOf = async (id: string) => (await Check.findByPk(id))?.state;

/** Every row of every table as text. */
async function everything(): Promise<string> {
  const { db } = server.deps;
  const tables = await db.query<{ name: string }>("SELECT name FROM sqlite_master WHERE type = 'table'", {
    type: QueryTypes.SELECT,
  });
  expect(tables.length).toBeGreaterThan(15);
  const rows = await Promise.all(
    tables.map(({ name }) => db.query(`SELECT * FROM "${name}"`, { type: QueryTypes.SELECT })),
  );
  return JSON.stringify(rows);
}

const files = () => readdirSync(join(server.deps.config.uploadsDir, 'files'));

describe.each(['leave', 'withdraw'])('POST /api/account/delete with checks to %s', (choice) => {
  it('leaves nothing of the person in any table, nor their files', async () => {
    const before = await everything();
    const { passwordHash } = await User.findByPk(user.id, { rejectOnEmpty: true });
    const personal = [...Object.values(words), `wendelin${count}@example.org`, passwordHash];
    for (const text of personal) expect(before).toContain(text);
    expect(files()).toHaveLength(1);

    const { status, body } = await erase(choice);
    expect([status, body.user]).toEqual([200, null]);
    await server.deps.jobs.settle();

    const after = await everything();
    for (const text of personal) expect(after).not.toContain(text);
    expect(files()).toEqual([]);
    expect(await CellType.count({ where: { proposedById: user.id } })).toBe(0);
  });

  it('ends every sign-in at once, here and elsewhere', async () => {
    const elsewhere = await openBrowser(server.app);
    await signInAs(elsewhere, user.email);
    await erase(choice);
    for (const one of [browser, elsewhere]) {
      expect((await one.get('/api/banks')).status).toBe(401);
      expect((await one.get('/api/account/session')).body.user).toBeNull();
      expect((await one.post('/api/account/refresh')).status).not.toBe(200);
    }
    expect(await Session.count({ where: { userId: user.id } })).toBe(0);
    expect((await signInAs(await openBrowser(server.app), user.email)).status).toBe(401);
  });

  it('frees the address for a new account, which has nothing of the old', async () => {
    await erase(choice);
    await createAccount(server, user.email);
    const anew = await openBrowser(server.app);
    await signInAs(anew, user.email);
    expect((await anew.get('/api/banks')).body.banks).toEqual([]);
  });

  it('leaves the trail as it was, chained, with ids only', async () => {
    await erase(choice);
    const entries = await TrailEntry.findAll({ order: [['id', 'ASC']] });
    let previous = '';
    for (const { at, actorId, actorRole, subjectType, subjectId, action, details, hash } of entries) {
      expect(hash).toBe(
        trailHash({ at, actorId, actorRole, subjectType, subjectId, action, details }, previous),
      );
      previous = hash;
    }
    expect(JSON.stringify(entries)).not.toMatch(/@|Wendelin|Nachbar|Kellerraum|Bootssteg/);
    expect(entries.at(-1)).toMatchObject({
      subjectId: user.id,
      action: 'deleted',
      details: { checks: choice },
    });
  });
});

describe('checks that are left', () => {
  it('stay approved or waiting; what waited for its owner is withdrawn', async () => {
    await erase('leave');
    expect(await Promise.all([approved, waiting, askedBack].map(stateOf))).toEqual([
      'approved',
      'submitted',
      'withdrawn',
    ]);
    await decide(waiting, { action: 'approve' });
    expect(await stateOf(waiting)).toBe('approved');
  });

  it('go on counting as one owner’s', async () => {
    const second = (await browser.post('/api/banks', bankInput({ name: 'Second' }))).body.id;
    const { body } = await browser.post(`/api/banks/${second}/checks`, checkInput());
    await decide(body.id, { action: 'approve' });
    await erase('leave');
    const rows = await server.deps.db.transaction((transaction) => approvedRows(transaction));
    const own = rows.filter(({ bank }) => bank === bankId || bank === second);
    expect(own.map(({ owner }) => owner)).toEqual([user.id, user.id]);
  });
});

describe('checks that are withdrawn', () => {
  it('leave the pool, and a refit is asked for', async () => {
    const refits = () => Job.count({ where: { kind: 'refit' } });
    await server.deps.jobs.settle();
    const before = await refits();
    await erase('withdraw');
    expect(await Promise.all([approved, waiting, askedBack].map(stateOf))).toEqual(
      Array(3).fill('withdrawn'),
    );
    expect(await refits()).toBe(before + 1);
    const rows = await server.deps.db.transaction((transaction) => approvedRows(transaction));
    expect(rows.some(({ bank }) => bank === bankId)).toBe(false);
    await server.deps.jobs.settle();
  });
});

describe('refusals', () => {
  it.each<[string, object, string]>([
    ['a wrong password', { currentPassword: 'not this one', checks: 'leave' }, 'currentPassword'],
    ['no password', { checks: 'leave' }, 'currentPassword'],
    ['no choice', { currentPassword: goodPassword }, 'checks'],
    ['a choice that is not offered', { currentPassword: goodPassword, checks: 'sell' }, 'checks'],
  ])('%s: beside the field, and nothing is deleted', async (_name, body, field) => {
    const answer = await browser.post('/api/account/delete', body);
    expect([answer.status, Object.keys(answer.body.error.fields)]).toEqual([422, [field]]);
    expect((await Bank.findByPk(bankId))?.name).toBe(words.name);
    expect((await browser.get('/api/banks')).status).toBe(200);
  });

  it('visitors', async () => {
    expect((await erase('leave', goodPassword, await openBrowser(server.app))).status).toBe(401);
  });

  it('the only steward, until there is another', async () => {
    await createAccount(server, 'steward@example.net', { role: 'steward' });
    const steward = await openBrowser(server.app);
    await signInAs(steward, 'steward@example.net');
    expect((await erase('leave', goodPassword, steward)).body.error.code).toBe('conflict');
    await createAccount(server, 'second@example.net', { role: 'steward' });
    expect((await erase('leave', goodPassword, steward)).status).toBe(200);
  });
});

it('proves words in the trail while they are there', async () => {
  const [text] = await TrailText.findAll({ where: { text: words.answer } });
  const entry = await TrailEntry.findByPk(text!.trailId);
  expect(entry?.details.textDigests).toEqual({ answer: textDigest(text!.salt, text!.text) });
});
