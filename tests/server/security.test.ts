import supertest from 'supertest';

import { readConfig } from '@/server/config';

import { createAccount, signInAs } from '../support/accounts';
import { openBrowser } from '../support/browser';
import { startTestServer, type TestServer } from '../support/testServer';

const secret = 'a text of more than thirty-two characters';
const production = {
  NODE_ENV: 'production',
  EBBLINE_MODE: 'production',
  EBBLINE_SECRET: secret,
  EBBLINE_PUBLIC_URL: 'https://exchange.example.org',
} as const;

describe('the settings', () => {
  it('are refused in production without a secret, with the demo one, and with a short one', () => {
    const { EBBLINE_SECRET: _left, ...without } = production;
    const demo = readConfig({ NODE_ENV: 'test' }).secret;
    expect(() => readConfig(without)).toThrow(/EBBLINE_SECRET/);
    expect(() => readConfig({ ...production, EBBLINE_SECRET: demo })).toThrow(/EBBLINE_SECRET/);
    expect(() => readConfig({ ...production, EBBLINE_SECRET: 'short' })).toThrow(/EBBLINE_SECRET/);
  });

  it('are refused in production without the public address', () => {
    const { EBBLINE_PUBLIC_URL: _left, ...without } = production;
    expect(() => readConfig(without)).toThrow(/EBBLINE_PUBLIC_URL/);
  });

  it('in production mean Secure cookies, rate limits, no demo, and passwords hashed at 12 or more', () => {
    expect(readConfig({ ...production, EBBLINE_BCRYPT_COST: '4' })).toMatchObject({
      isDemo: false,
      hasSecureCookies: true,
      hasRateLimits: true,
      bcryptCost: 12,
    });
  });
});

describe('answers', () => {
  let server: TestServer;
  beforeAll(async () => (server = await startTestServer({ hasSecureCookies: true })));
  afterAll(() => server.stop());

  it('carry a policy that lets no inline and no foreign script run', async () => {
    const { headers } = await supertest(server.app).get('/api/account/session');
    const policy = Object.fromEntries(
      String(headers['content-security-policy'])
        .split(';')
        .map((directive) => directive.split(/ (.*)/)),
    );
    expect(policy['default-src']).toBe("'self'");
    expect(policy['script-src']).toBe("'self'");
    expect(policy['script-src-attr']).toBe("'none'");
    expect(policy['object-src']).toBe("'none'");
    expect(policy['frame-ancestors']).toBe("'self'");
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['x-powered-by']).toBeUndefined();
    expect(headers['cache-control']).toBe('no-store');
  });

  it('set Secure on every cookie where the site has TLS', async () => {
    await createAccount(server, 'tls@example.org');
    const session = await supertest(server.app).get('/api/account/session');
    const csrfCookie = String(session.headers['set-cookie']).split(';')[0]!;
    const { headers } = await supertest(server.app)
      .post('/api/account/sign-in')
      .set('Cookie', csrfCookie)
      .set('x-csrf-token', session.body.csrfToken)
      .send({ email: 'tls@example.org', password: 'tide table in the hall' });
    const cookies = [headers['set-cookie']].flat();
    expect(cookies).toHaveLength(3);
    for (const cookie of cookies) expect(cookie).toMatch(/; Secure/);
  });

  it('refuse broken JSON, the wrong type and too much in the one error shape', async () => {
    const session = await supertest(server.app).get('/api/account/session');
    const post = (body: string, type = 'application/json') =>
      supertest(server.app)
        .post('/api/account/sign-in')
        .set('Cookie', String(session.headers['set-cookie']).split(';')[0]!)
        .set('x-csrf-token', session.body.csrfToken)
        .set('content-type', type)
        .send(body);
    const answers = [
      await post('{"email":'),
      await post('email=a@example.org', 'text/plain'),
      await post(JSON.stringify({ email: 'x'.repeat(300_000) })),
      await post('{"__proto__":{"email":"a@example.org"},"password":"x"}'),
    ];
    expect(answers.map(({ status }) => status)).toEqual([400, 422, 413, 422]);
    for (const { body } of answers)
      expect(body.error).toMatchObject({
        code: expect.any(String),
        message: expect.any(String),
        fields: expect.any(Object),
      });
  });
});

describe('rate limits', () => {
  let server: TestServer;
  beforeEach(async () => (server = await startTestServer({ hasRateLimits: true })));
  afterEach(() => server.stop());

  it('stop guessing at passwords after 20 tries, even with the right one then', async () => {
    await createAccount(server, 'guessed@example.org');
    const browser = await openBrowser(server.app);
    for (let tries = 0; tries < 20; tries += 1)
      expect((await signInAs(browser, 'guessed@example.org', 'not the password')).status).toBe(401);
    const { status, body } = await signInAs(browser, 'guessed@example.org');
    expect([status, body.error.code]).toEqual([429, 'tooManyRequests']);
  });

  it('stop mails to others after 10 requests, and leave reading alone', async () => {
    const browser = await openBrowser(server.app);
    const ask = (path: string) => browser.post(`/api/account/${path}`, { email: 'a@example.org' });
    for (let tries = 0; tries < 5; tries += 1) {
      expect((await ask('request-reset')).status).toBe(202);
      expect((await ask('resend-verification')).status).toBe(202);
    }
    expect((await ask('request-reset')).status).toBe(429);
    expect((await browser.get('/api/account/session')).status).toBe(200);
  });
});
