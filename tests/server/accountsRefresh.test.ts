import { graceMs } from '@/server/accounts/refreshSession';
import { Session, TrailEntry, type User } from '@/server/db/models';

import { createAccount, signInAs } from '../support/accounts';
import { type Browser, openBrowser } from '../support/browser';
import { startTestServer, type TestServer } from '../support/testServer';

const start = new Date('2026-12-01T12:00:00Z').getTime();
let server: TestServer;
let browser: Browser;
let user: User;
let count = 0;

beforeAll(async () => (server = await startTestServer()));
afterAll(() => server.stop());
beforeEach(async () => {
  waitTo(0);
  count += 1;
  user = await createAccount(server, `refresh${count}@example.org`);
  browser = await openBrowser(server.app);
  await signInAs(browser, user.email);
});

function waitTo(ms: number) {
  server.setNow(new Date(start + ms).toISOString());
}

/** A browser that holds a refresh token and nothing else. */
async function holderOf(token: string | undefined): Promise<Browser> {
  const holder = await openBrowser(server.app);
  holder.setCookie('ebblineRefresh', token);
  return holder;
}

const refresh = (holder: Browser) => holder.post('/api/account/refresh');

describe('refreshing a sign-in', () => {
  it('hands out a new access token and a new refresh token, and answers with the account', async () => {
    const first = browser.cookie('ebblineRefresh');
    browser.setCookie('ebblineAccess', undefined);
    const session = await browser.get('/api/account/session');
    expect(session.body).toMatchObject({ user: null, canRefresh: true });
    const again = await holderOf(first);
    const { status, body } = await refresh(again);
    expect([status, body.user.email]).toEqual([200, user.email]);
    expect(again.cookie('ebblineAccess')).toBeDefined();
    expect(again.cookie('ebblineRefresh')).not.toBe(first);
    expect((await again.get('/api/account/session')).body.user.email).toBe(user.email);
  });

  it('takes the role as it is now', async () => {
    await user.update({ role: 'moderator' });
    expect((await refresh(browser)).body.user.role).toBe('moderator');
  });

  it('ends the whole sign-in when a used token comes again later, and writes it down', async () => {
    const stolen = browser.cookie('ebblineRefresh');
    await refresh(browser);
    waitTo(graceMs + 1);
    const thief = await holderOf(stolen);
    expect((await refresh(thief)).body.error.code).toBe('sessionEnded');
    expect((await refresh(browser)).body.error.code).toBe('sessionEnded');
    expect(browser.cookie('ebblineRefresh')).toBeUndefined();
    const entry = await TrailEntry.findOne({ where: { subjectId: user.id }, rejectOnEmpty: true });
    expect(entry).toMatchObject({ action: 'sessionReused', actorRole: 'system', actorId: null });
  });

  it('leaves other sign-ins of the account alone', async () => {
    const other = await openBrowser(server.app);
    await signInAs(other, user.email);
    const stolen = browser.cookie('ebblineRefresh');
    await refresh(browser);
    waitTo(graceMs + 1);
    await refresh(await holderOf(stolen));
    expect((await refresh(other)).status).toBe(200);
  });

  it('gives two tabs that ask at once the same successor', async () => {
    const token = browser.cookie('ebblineRefresh');
    const tabs = await Promise.all([holderOf(token), holderOf(token)]);
    const answers = await Promise.all(tabs.map(refresh));
    expect(answers.map(({ status }) => status)).toEqual([200, 200]);
    const [one, two] = tabs.map((tab) => tab.cookie('ebblineRefresh'));
    expect(one).toBe(two);
    expect(await Session.count({ where: { userId: user.id } })).toBe(2);
  });

  it('ends the sign-in even within the grace once the successor has been used', async () => {
    const stolen = browser.cookie('ebblineRefresh');
    await refresh(browser);
    await refresh(browser);
    expect((await refresh(await holderOf(stolen))).status).toBe(401);
    expect((await refresh(browser)).status).toBe(401);
  });

  it('ends after 30 days without use', async () => {
    waitTo(30 * 86_400_000 - 1);
    expect((await refresh(browser)).status).toBe(200);
    waitTo(60 * 86_400_000);
    const { status, body } = await refresh(browser);
    expect([status, body.error.code]).toEqual([401, 'sessionEnded']);
  });

  it('refuses an unknown token, none, and one that is no text', async () => {
    for (const token of ['x'.repeat(43), undefined, 'j:{"a":1}'])
      expect((await refresh(await holderOf(token))).body.error.code).toBe('sessionEnded');
  });

  it('asks for the CSRF token', async () => {
    const { default: supertest } = await import('supertest');
    const { body } = await supertest(server.app)
      .post('/api/account/refresh')
      .set('Cookie', `ebblineRefresh=${browser.cookie('ebblineRefresh')}`);
    expect(body.error.code).toBe('csrf');
  });
});
