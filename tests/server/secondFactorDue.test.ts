import { readConfig } from '@/server/config';
import { Upload, type User } from '@/server/db/models';

import { createAccount, signInAs } from '../support/accounts';
import { bankInput, checkInput, createCellType } from '../support/bankFixtures';
import { type Browser, openBrowser } from '../support/browser';
import { setUpCodes } from '../support/codes';
import { startTestServer, type TestServer } from '../support/testServer';

let server: TestServer;

beforeAll(async () => {
  server = await startTestServer({ requiresSecondFactor: true, hasRateLimits: true });
  await createCellType();
});
afterAll(() => server.stop());

async function signedIn(role: User['role'], email: string): Promise<Browser> {
  await createAccount(server, email, { role });
  const browser = await openBrowser(server.app);
  await signInAs(browser, email);
  return browser;
}

describe('where a second step is required', () => {
  it.each(['moderator', 'steward'] as const)('a %s without one may do none of the work', async (role) => {
    const browser = await signedIn(role, `${role}-due@example.org`);
    expect((await browser.get('/api/account/session')).body.user.secondFactor).toBe('due');
    expect((await browser.get('/api/account/second-factor')).body).toMatchObject({
      isOn: false,
      isRequired: true,
    });
    for (const path of ['/api/screening', '/api/fits']) {
      const { status, body } = await browser.get(path);
      expect([status, body.error.code]).toEqual([403, 'secondFactorDue']);
    }
    const undo = await browser.post('/api/screening/undo', { decisionIds: [] });
    expect(undo.body.error.code).toBe('secondFactorDue');
  });

  it('a moderator without one sees no photo of others', async () => {
    const owner = await signedIn('owner', 'photographer@example.org');
    const { body: bank } = await owner.post('/api/banks', bankInput());
    const { body: session } = await owner.get('/api/account/session');
    const storageKey = await server.deps.storage.write(Buffer.from('large'));
    const thumbKey = await server.deps.storage.write(Buffer.from('small'));
    const photo = await Upload.create({
      ...{ ownerId: session.user.id, bankId: bank.id, kind: 'photo', filename: 'meter.jpg' },
      ...{ storageKey, thumbKey, sha256: 'a'.repeat(64), bytes: 5, width: 4, height: 3, state: 'ready' },
    });
    await owner.post(`/api/banks/${bank.id}/checks`, checkInput({ photoId: photo.id }));
    const moderator = await signedIn('moderator', 'photo-due@example.org');
    expect((await moderator.get(`/api/photos/${photo.id}`)).status).toBe(404);
    await setUpCodes(server, moderator);
    expect((await moderator.get(`/api/photos/${photo.id}`)).status).toBe(200);
  });

  it('a moderator may do it as soon as it is set up', async () => {
    const browser = await signedIn('moderator', 'sets-up@example.org');
    await setUpCodes(server, browser);
    expect((await browser.get('/api/screening')).status).toBe(200);
    expect((await browser.get('/api/account/session')).body.user.secondFactor).toBe('on');
  });

  it('an owner needs none, and goes on with their own banks', async () => {
    const browser = await signedIn('owner', 'plain@example.org');
    expect((await browser.get('/api/account/session')).body.user.secondFactor).toBe('off');
    expect((await browser.get('/api/banks')).status).toBe(200);
    expect((await browser.get('/api/screening')).body.error.code).toBe('notAllowed');
  });
});

describe('the setting', () => {
  const production = {
    EBBLINE_MODE: 'production',
    EBBLINE_SECRET: 's'.repeat(40),
    EBBLINE_PUBLIC_URL: 'https://exchange.example',
  };
  const required = (settings: Record<string, string>) =>
    readConfig({ NODE_ENV: 'test', ...settings }).requiresSecondFactor;

  it('is on in production and off in a demo, unless the environment says otherwise', () => {
    expect(required(production)).toBe(true);
    expect(required({})).toBe(false);
    expect(required({ EBBLINE_SECOND_FACTOR: 'required' })).toBe(true);
    expect(required({ ...production, EBBLINE_SECOND_FACTOR: 'optional' })).toBe(false);
  });
});

it('holds up guesses by the address they come from, too', async () => {
  const visitor = await openBrowser(server.app);
  const answers: string[] = [];
  while (answers.at(-1) !== 'tooManyRequests' && answers.length < 30)
    answers.push((await visitor.post('/api/account/sign-in-code', { code: '123456' })).body.error.code);
  expect(answers.length).toBeLessThanOrEqual(21);
  expect(new Set(answers.slice(0, -1))).toEqual(new Set(['gone']));
});
