import jwt from 'jsonwebtoken';

import { Session, TrailEntry } from '@/server/db/models';

import { createAccount, goodPassword, signInAs } from '../support/accounts';
import { type Browser, lastMailTo, openBrowser, tokenMailedTo } from '../support/browser';
import { startTestServer, type TestServer } from '../support/testServer';

let server: TestServer;
let browser: Browser;

beforeAll(async () => (server = await startTestServer()));
afterAll(() => server.stop());
beforeEach(async () => {
  server.setNow('2026-12-01T12:00:00Z');
  browser = await openBrowser(server.app);
});

const cookiesOf = (headers: Record<string, unknown>) =>
  Object.fromEntries(
    [headers['set-cookie'] ?? []].flat().map((line) => [String(line).split('=')[0], String(line)]),
  );

describe('the session', () => {
  it('is nobody for a visitor', async () => {
    const { status, body } = await browser.get('/api/account/session');
    expect(status).toBe(200);
    expect(body).toEqual({ user: null, csrfToken: expect.any(String), canRefresh: false, isDemo: true });
  });

  it('is nobody for a forged, an expired and an unsigned token', async () => {
    const claims = { sub: 'x', role: 'steward', fam: 'x' };
    const tokens = [
      jwt.sign(claims, 'another secret of at least 32 characters'),
      jwt.sign(claims, server.deps.config.secret, { expiresIn: -1 }),
      jwt.sign(claims, '', { algorithm: 'none' }),
      'j:{"a":1}',
    ];
    for (const token of tokens) {
      browser.setCookie('ebblineAccess', token);
      const { status, body } = await browser.get('/api/account/session');
      expect([status, body.user]).toEqual([200, null]);
    }
  });

  it('survives a CSRF cookie that is no text', async () => {
    const { status } = await browser.get('/api/account/session').set('Cookie', 'ebblineCsrf=j:{"a":1}');
    expect(status).toBe(200);
  });
});

describe('signing in', () => {
  it('answers with the account and sets cookies that neither scripts nor other sites can use', async () => {
    const user = await createAccount(server, 'owner@example.org');
    const response = await signInAs(browser, ' Owner@Example.org');
    expect(response.status).toBe(200);
    expect(response.body.user).toEqual({
      ...{ id: user.id, email: 'owner@example.org', role: 'owner' },
      secondFactor: 'off',
    });
    const cookies = cookiesOf(response.headers);
    expect(cookies.ebblineAccess).toMatch(/Max-Age=900; Path=\/api; .*HttpOnly; SameSite=Strict$/);
    expect(cookies.ebblineRefresh).toMatch(
      /Max-Age=2592000; Path=\/api\/account; .*HttpOnly; SameSite=Strict$/,
    );
    expect(cookies.ebblineCsrf).toMatch(/HttpOnly; SameSite=Strict$/);
    expect((await browser.get('/api/account/session')).body.user.email).toBe('owner@example.org');
  });

  it('gives an access token of 15 minutes', async () => {
    await createAccount(server, 'quarter@example.org');
    await signInAs(browser, 'quarter@example.org');
    const { iat, exp } = jwt.decode(browser.cookie('ebblineAccess')!) as jwt.JwtPayload;
    expect(exp! - iat!).toBe(15 * 60);
  });

  it('stores of the refresh token only a hash', async () => {
    await createAccount(server, 'stored@example.org');
    await signInAs(browser, 'stored@example.org');
    const rows = await Session.findAll({ raw: true });
    expect(rows.length).toBeGreaterThan(0);
    expect(JSON.stringify(rows)).not.toContain(browser.cookie('ebblineRefresh'));
  });

  it('answers a wrong password and no account alike', async () => {
    await createAccount(server, 'known@example.org');
    const wrong = await signInAs(browser, 'known@example.org', 'not the password');
    const nobody = await signInAs(browser, 'unknown@example.org', 'not the password');
    expect(wrong.body.error.code).toBe('wrongCredentials');
    expect([wrong.status, wrong.text]).toEqual([nobody.status, nobody.text]);
    expect(Object.keys(cookiesOf(wrong.headers))).toEqual(Object.keys(cookiesOf(nobody.headers)));
  });

  it('counts every character of a long password', async () => {
    const user = await createAccount(server, 'long@example.org');
    const { hashPassword } = await import('@/server/accounts/passwords');
    const start = 'a rather long sentence about the sea, '.repeat(4);
    await user.update({ passwordHash: await hashPassword(`${start}one`, 4) });
    expect((await signInAs(browser, 'long@example.org', `${start}two`)).status).toBe(401);
    expect((await signInAs(browser, 'long@example.org', `${start}one`)).status).toBe(200);
  });

  it('tells of an unconfirmed address after the right password only, and mails the link again', async () => {
    await createAccount(server, 'unconfirmed@example.org', { isConfirmed: false });
    const wrong = await signInAs(browser, 'unconfirmed@example.org', 'not the password');
    expect(wrong.body.error.code).toBe('wrongCredentials');
    expect(await lastMailTo('unconfirmed@example.org')).toBeNull();
    const right = await signInAs(browser, 'unconfirmed@example.org');
    expect([right.status, right.body.error.code]).toEqual([403, 'addressUnconfirmed']);
    expect(cookiesOf(right.headers).ebblineAccess).toBeUndefined();
    const token = await tokenMailedTo('unconfirmed@example.org');
    expect((await browser.post('/api/account/verify', { token })).status).toBe(200);
  });

  it('refuses missing fields beside them', async () => {
    const { status, body } = await browser.post('/api/account/sign-in', {});
    expect(status).toBe(422);
    expect(Object.keys(body.error.fields).sort()).toEqual(['email', 'password']);
  });
});

describe('the CSRF token', () => {
  it('is asked of every request that changes something', async () => {
    await createAccount(server, 'csrf@example.org');
    const body = { email: 'csrf@example.org', password: goodPassword };
    const { default: supertest } = await import('supertest');
    const bare = await supertest(server.app).post('/api/account/sign-in').send(body);
    expect([bare.status, bare.body.error.code]).toEqual([403, 'csrf']);
  });

  it("is refused when it is another browser's", async () => {
    const other = await openBrowser(server.app);
    const { body } = await other.get('/api/account/session');
    const response = await browser.get('/api/account/session');
    const { default: supertest } = await import('supertest');
    const crossed = await supertest(server.app)
      .post('/api/account/sign-out')
      .set(
        'Cookie',
        [response.headers['set-cookie']].flat().map((line) => line!.split(';')[0]!),
      )
      .set('x-csrf-token', body.csrfToken)
      .send({});
    expect(crossed.body.error.code).toBe('csrf');
  });

  it('changes with the sign-in, and stays the same from tab to tab', async () => {
    await createAccount(server, 'tabs@example.org');
    const visitor = await browser.get('/api/account/session');
    const signedIn = await signInAs(browser, 'tabs@example.org');
    expect(signedIn.body.csrfToken).not.toBe(visitor.body.csrfToken);
    const tab = await browser.get('/api/account/session');
    expect(tab.body.csrfToken).toBe(signedIn.body.csrfToken);
  });
});

describe('signing out', () => {
  it('here ends this sign-in and no other', async () => {
    await createAccount(server, 'two@example.org');
    const other = await openBrowser(server.app);
    await signInAs(browser, 'two@example.org');
    await signInAs(other, 'two@example.org');
    const refreshToken = browser.cookie('ebblineRefresh');
    const { status, body } = await browser.post('/api/account/sign-out');
    expect([status, body.user, body.canRefresh]).toEqual([200, null, false]);
    expect(browser.cookie('ebblineAccess')).toBeUndefined();
    expect(browser.cookie('ebblineRefresh')).toBeUndefined();
    browser.setCookie('ebblineRefresh', refreshToken);
    expect((await browser.post('/api/account/refresh')).body.error.code).toBe('sessionEnded');
    expect((await other.post('/api/account/refresh')).status).toBe(200);
  });

  it('everywhere ends them all and is written down', async () => {
    const user = await createAccount(server, 'all@example.org');
    const other = await openBrowser(server.app);
    await signInAs(browser, 'all@example.org');
    await signInAs(other, 'all@example.org');
    expect((await other.get('/api/account/notices')).status).toBe(200);
    await browser.post('/api/account/sign-out', { everywhere: true });
    // At once, and not when its access token runs out.
    expect((await other.get('/api/account/notices')).status).toBe(401);
    expect((await other.post('/api/account/refresh')).status).toBe(401);
    const entries = await TrailEntry.findAll({ where: { subjectId: user.id } });
    expect(entries.map(({ action }) => action)).toEqual(['signedOutEverywhere']);
  });

  it('works with the refresh token alone, and for who is signed out already', async () => {
    await createAccount(server, 'idle@example.org');
    await signInAs(browser, 'idle@example.org');
    browser.setCookie('ebblineAccess', undefined);
    const { body } = await browser.get('/api/account/session');
    expect(body).toMatchObject({ user: null, canRefresh: true });
    const refreshToken = browser.cookie('ebblineRefresh');
    const visitor = await openBrowser(server.app);
    visitor.setCookie('ebblineRefresh', refreshToken);
    expect((await visitor.post('/api/account/sign-out')).status).toBe(200);
    expect((await visitor.post('/api/account/sign-out')).status).toBe(200);
    expect(await Session.count({ where: { revokedAt: null, usedAt: null } })).toBeGreaterThanOrEqual(0);
    visitor.setCookie('ebblineRefresh', refreshToken);
    expect((await visitor.post('/api/account/refresh')).status).toBe(401);
  });
});
