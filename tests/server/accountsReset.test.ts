import { OutboxMail, TrailEntry } from '@/server/db/models';

import { createAccount, goodPassword, signInAs } from '../support/accounts';
import { type Browser, lastMailTo, openBrowser, tokenMailedTo } from '../support/browser';
import { startTestServer, type TestServer } from '../support/testServer';

const newPassword = 'a different sentence';
let server: TestServer;
let browser: Browser;

beforeAll(async () => (server = await startTestServer()));
afterAll(() => server.stop());
beforeEach(async () => {
  server.setNow('2026-12-01T12:00:00Z');
  browser = await openBrowser(server.app);
});

async function askFor(email: string): Promise<string> {
  await browser.post('/api/account/request-reset', { email });
  return tokenMailedTo(email);
}

const reset = (token: string, password = newPassword) =>
  browser.post('/api/account/reset', { token, password });

describe('asking for a new password', () => {
  it('answers the same with and without an account, and mails only to an account', async () => {
    await createAccount(server, 'has@example.org');
    const mailsBefore = await OutboxMail.count();
    const known = await browser.post('/api/account/request-reset', { email: 'has@example.org' });
    const unknown = await browser.post('/api/account/request-reset', { email: 'has-not@example.org' });
    expect([known.status, known.text]).toEqual([202, '{"accepted":true}']);
    expect([unknown.status, unknown.text]).toEqual([known.status, known.text]);
    expect(await OutboxMail.count()).toBe(mailsBefore + 1);
  });

  it('refuses what is no address', async () => {
    const { status, body } = await browser.post('/api/account/request-reset', { email: '<b>' });
    expect([status, Object.keys(body.error.fields)]).toEqual([422, ['email']]);
  });
});

describe('choosing a new password', () => {
  it('changes it, ends every sign-in, tells by mail and writes it down', async () => {
    const user = await createAccount(server, 'forgot@example.org');
    const elsewhere = await openBrowser(server.app);
    await signInAs(elsewhere, user.email);
    expect((await reset(await askFor(user.email))).status).toBe(200);
    expect((await elsewhere.post('/api/account/refresh')).body.error.code).toBe('sessionEnded');
    expect((await signInAs(browser, user.email, goodPassword)).status).toBe(401);
    expect((await signInAs(browser, user.email, newPassword)).status).toBe(200);
    expect((await lastMailTo(user.email))?.subject).toBe('Your password was changed');
    const entries = await TrailEntry.findAll({ where: { subjectId: user.id } });
    expect(entries.map(({ action }) => action)).toEqual(['passwordReset']);
  });

  it('works once, and only with the newest link', async () => {
    await createAccount(server, 'newest@example.org');
    const older = await askFor('newest@example.org');
    const newer = await askFor('newest@example.org');
    expect((await reset(older)).body.error.code).toBe('gone');
    expect((await reset(newer)).status).toBe(200);
    expect((await reset(newer)).body.error.code).toBe('gone');
  });

  it('refuses a link that is an hour old', async () => {
    await createAccount(server, 'old@example.org');
    const token = await askFor('old@example.org');
    server.setNow('2026-12-01T13:00:00Z');
    expect((await reset(token)).status).toBe(410);
  });

  it('keeps the link good when the password is refused', async () => {
    await createAccount(server, 'retry@example.org');
    const token = await askFor('retry@example.org');
    const { status, body } = await reset(token, 'password123');
    expect([status, Object.keys(body.error.fields)]).toEqual([422, ['password']]);
    expect((await reset(token)).status).toBe(200);
  });

  it('confirms the address, as the mail arrived there', async () => {
    await createAccount(server, 'unconfirmed@example.org', { isConfirmed: false });
    await reset(await askFor('unconfirmed@example.org'));
    expect((await signInAs(browser, 'unconfirmed@example.org', newPassword)).status).toBe(200);
  });
});
