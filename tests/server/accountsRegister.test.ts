import { OutboxMail, OneTimeToken, TrailEntry, User } from '@/server/db/models';

import { createAccount, goodPassword, signInAs } from '../support/accounts';
import { type Browser, lastMailTo, openBrowser, tokenMailedTo } from '../support/browser';
import { startTestServer, type TestServer } from '../support/testServer';

let server: TestServer;
let browser: Browser;

beforeAll(async () => (server = await startTestServer({ publicUrl: 'https://exchange.example.org/' })));
afterAll(() => server.stop());
beforeEach(async () => {
  server.setNow('2026-12-01T12:00:00Z');
  browser = await openBrowser(server.app);
});

const register = (email: string, password = goodPassword) =>
  browser.post('/api/account/register', { email, password });

describe('registering', () => {
  it('opens an unconfirmed owner account, mails a link at the public address and writes the trail', async () => {
    const { status, body } = await register('New@Example.org ');
    expect([status, body]).toEqual([202, { accepted: true }]);
    const user = await User.findOne({ where: { email: 'new@example.org' }, rejectOnEmpty: true });
    expect(user).toMatchObject({ role: 'owner', emailVerifiedAt: null });
    expect(user.passwordHash).toMatch(/^\$2b\$04\$/);
    expect((await lastMailTo('new@example.org'))?.text).toMatch(
      /https:\/\/exchange\.example\.org\/verify\?token=[\w-]{43}\n/,
    );
    const entry = await TrailEntry.findOne({ where: { subjectId: user.id }, rejectOnEmpty: true });
    expect(entry).toMatchObject({ action: 'registered', actorId: user.id, details: {} });
  });

  it('stores of the link only a hash', async () => {
    await register('hashed@example.org');
    const token = await tokenMailedTo('hashed@example.org');
    const rows = await OneTimeToken.findAll({ raw: true });
    expect(JSON.stringify(rows)).not.toContain(token);
  });

  it('answers the same for an address that has an account, changes nothing and mails it so', async () => {
    const user = await createAccount(server, 'taken@example.org');
    const known = await register('taken@example.org', 'another long password');
    const unknown = await register('untaken@example.org', 'another long password');
    expect([known.status, known.text]).toEqual([unknown.status, unknown.text]);
    expect(Object.keys(known.headers).sort()).toEqual(Object.keys(unknown.headers).sort());
    expect((await user.reload()).changed()).toBe(false);
    expect((await signInAs(browser, 'taken@example.org')).status).toBe(200);
    const mail = await lastMailTo('taken@example.org');
    expect(mail?.subject).toBe('You already have an account');
    expect(mail?.text).not.toContain('token=');
  });

  it('gives an address that was never confirmed to whoever registers last', async () => {
    await register('waiting@example.org', 'the first password');
    const firstToken = await tokenMailedTo('waiting@example.org');
    await register('waiting@example.org', 'the second password');
    expect((await browser.post('/api/account/verify', { token: firstToken })).status).toBe(410);
    await browser.post('/api/account/verify', { token: await tokenMailedTo('waiting@example.org') });
    expect((await signInAs(browser, 'waiting@example.org', 'the first password')).status).toBe(401);
    expect((await signInAs(browser, 'waiting@example.org', 'the second password')).status).toBe(200);
  });

  it.each([
    ['no address', { password: goodPassword }, 'email'],
    ['something that is no address', { email: 'nobody', password: goodPassword }, 'email'],
    ['an object for an address', { email: { $ne: '' }, password: goodPassword }, 'email'],
    ['a short password', { email: 'a@example.org', password: 'ninechars' }, 'password'],
    ['a huge password', { email: 'a@example.org', password: 'x'.repeat(201) }, 'password'],
    ['a common password', { email: 'a@example.org', password: 'Sunshine123' }, 'password'],
    ['the address as password', { email: 'low.water@example.org', password: 'Low.Water123' }, 'password'],
  ])('refuses %s beside its field', async (_name, input, field) => {
    const { status, body } = await browser.post('/api/account/register', input);
    expect(status).toBe(422);
    expect(Object.keys(body.error.fields)).toEqual([field]);
  });

  it('refuses a role that was slipped in by ignoring it', async () => {
    await browser.post('/api/account/register', {
      email: 'sly@example.org',
      password: goodPassword,
      role: 'steward',
    });
    expect(await User.findOne({ where: { email: 'sly@example.org' } })).toMatchObject({ role: 'owner' });
  });
});

describe('confirming an address', () => {
  it('works once and lets the account sign in', async () => {
    await register('once@example.org');
    const token = await tokenMailedTo('once@example.org');
    expect((await browser.post('/api/account/verify', { token })).status).toBe(200);
    const again = await browser.post('/api/account/verify', { token });
    expect([again.status, again.body.error.code]).toEqual([410, 'gone']);
    expect((await signInAs(browser, 'once@example.org')).status).toBe(200);
    const user = await User.findOne({ where: { email: 'once@example.org' }, rejectOnEmpty: true });
    const actions = await TrailEntry.findAll({ where: { subjectId: user.id }, order: ['id'] });
    expect(actions.map(({ action }) => action)).toEqual(['registered', 'verified']);
  });

  it('refuses a link that is a day old', async () => {
    await register('late@example.org');
    const token = await tokenMailedTo('late@example.org');
    server.setNow('2026-12-02T12:00:00Z');
    expect((await browser.post('/api/account/verify', { token })).status).toBe(410);
  });

  it('refuses an unknown token, one for another purpose, and one that is cut off', async () => {
    await createAccount(server, 'other@example.org');
    await browser.post('/api/account/request-reset', { email: 'other@example.org' });
    const resetToken = await tokenMailedTo('other@example.org');
    expect((await browser.post('/api/account/verify', { token: resetToken })).status).toBe(410);
    expect((await browser.post('/api/account/verify', { token: 'x'.repeat(43) })).status).toBe(410);
    expect((await browser.post('/api/account/verify', { token: 'short' })).status).toBe(422);
  });

  it('sends the link again to who waits for it, and answers the same to all', async () => {
    await register('again@example.org');
    const firstToken = await tokenMailedTo('again@example.org');
    await createAccount(server, 'confirmed@example.org');
    const mailsBefore = await OutboxMail.count();
    const answers = [];
    for (const email of ['again@example.org', 'confirmed@example.org', 'nobody@example.org']) {
      const { status, text } = await browser.post('/api/account/resend-verification', { email });
      answers.push([status, text]);
    }
    expect(new Set(answers.map(String)).size).toBe(1);
    expect(answers[0]).toEqual([202, '{"accepted":true}']);
    expect(await OutboxMail.count()).toBe(mailsBefore + 1);
    expect((await browser.post('/api/account/verify', { token: firstToken })).status).toBe(410);
    const token = await tokenMailedTo('again@example.org');
    expect((await browser.post('/api/account/verify', { token })).status).toBe(200);
  });
});
