import { AddressChange, OutboxMail, TrailEntry, User } from '@/server/db/models';

import { createAccount, goodPassword, signInAs } from '../support/accounts';
import { type Browser, lastMailTo, openBrowser, tokenMailedTo } from '../support/browser';
import { startTestServer, type TestServer } from '../support/testServer';

const newPassword = 'a different sentence';
let server: TestServer;
let browser: Browser;
let user: User;
let count = 0;

beforeAll(async () => (server = await startTestServer()));
afterAll(() => server.stop());
beforeEach(async () => {
  server.setNow('2026-12-01T12:00:00Z');
  count += 1;
  user = await createAccount(server, `person${count}@example.org`);
  browser = await openBrowser(server.app);
  await signInAs(browser, user.email);
});

const actionsOf = async () =>
  (await TrailEntry.findAll({ where: { subjectId: user.id }, order: ['id'] })).map(({ action }) => action);
const subjectsTo = async (recipient: string) =>
  (await OutboxMail.findAll({ where: { recipient }, order: [['rowid', 'ASC']] })).map(
    ({ subject }) => subject,
  );

describe('POST /api/account/change-password', () => {
  const change = (body: object, from = browser) => from.post('/api/account/change-password', body);

  it('changes it, ends the other sign-ins, keeps this one, tells by mail and writes it down', async () => {
    const elsewhere = await openBrowser(server.app);
    await signInAs(elsewhere, user.email);
    const { status, body } = await change({ currentPassword: goodPassword, password: newPassword });
    expect([status, body]).toEqual([200, { accepted: true }]);
    expect((await elsewhere.post('/api/account/refresh')).body.error.code).toBe('sessionEnded');
    expect((await browser.post('/api/account/refresh')).status).toBe(200);
    const again = await openBrowser(server.app);
    expect((await signInAs(again, user.email, goodPassword)).status).toBe(401);
    expect((await signInAs(again, user.email, newPassword)).status).toBe(200);
    const mail = await lastMailTo(user.email);
    expect(mail?.subject).toBe('Your password was changed');
    expect(mail?.text).toContain('every other browser');
    expect(await actionsOf()).toEqual(['passwordChanged']);
  });

  it('voids links that wait in mails', async () => {
    await browser.post('/api/account/request-reset', { email: user.email });
    const token = await tokenMailedTo(user.email);
    await change({ currentPassword: goodPassword, password: newPassword });
    const reset = await browser.post('/api/account/reset', { token, password: 'yet another sentence' });
    expect(reset.body.error.code).toBe('gone');
  });

  it.each<[string, object, string]>([
    [
      'a wrong present password',
      { currentPassword: 'not this one', password: newPassword },
      'currentPassword',
    ],
    ['no present password', { password: newPassword }, 'currentPassword'],
    ['a short one', { currentPassword: goodPassword, password: 'short' }, 'password'],
    ['one tried first', { currentPassword: goodPassword, password: 'password123' }, 'password'],
  ])('refuses %s beside the field and changes nothing', async (_name, body, field) => {
    const answer = await change(body);
    expect([answer.status, Object.keys(answer.body.error.fields)]).toEqual([422, [field]]);
    expect((await signInAs(await openBrowser(server.app), user.email)).status).toBe(200);
  });

  it('is for who is signed in', async () => {
    const visitor = await openBrowser(server.app);
    const body = { currentPassword: goodPassword, password: newPassword };
    expect((await change(body, visitor)).status).toBe(401);
  });
});

describe('moving to another address', () => {
  const next = () => `moved${count}@example.org`;
  const ask = (email = next(), currentPassword = goodPassword) =>
    browser.post('/api/account/change-email', { email, currentPassword });
  const confirm = async (token: string) =>
    (await openBrowser(server.app)).post('/api/account/confirm-email', { token });

  it('takes effect when the mailed link is used, and tells the old address before and after', async () => {
    const { status, body } = await ask();
    expect([status, body]).toEqual([202, { accepted: true }]);
    expect((await signInAs(await openBrowser(server.app), next())).status).toBe(401);
    expect((await signInAs(await openBrowser(server.app), user.email)).status).toBe(200);
    expect(await subjectsTo(user.email)).toEqual(['Your account is to move to another address']);
    expect((await confirm(await tokenMailedTo(next()))).status).toBe(200);
    expect((await signInAs(await openBrowser(server.app), next())).status).toBe(200);
    expect((await signInAs(await openBrowser(server.app), user.email)).status).toBe(401);
    expect(await subjectsTo(user.email)).toContain('Your account has moved to another address');
    expect(await actionsOf()).toEqual(['emailChanged']);
    const trail = JSON.stringify(await TrailEntry.findAll());
    expect(trail).not.toContain('@example.org');
  });

  it('works once, with the newest link, within a day', async () => {
    await ask('first@example.org');
    const older = await tokenMailedTo('first@example.org');
    await ask();
    const newer = await tokenMailedTo(next());
    expect((await confirm(older)).body.error.code).toBe('gone');
    server.setNow('2026-12-02T12:00:00Z');
    expect((await confirm(newer)).body.error.code).toBe('gone');
    server.setNow('2026-12-02T11:59:59Z');
    expect((await confirm(newer)).status).toBe(200);
    expect((await confirm(newer)).status).toBe(410);
  });

  it('answers the same when the address has an account, which is told', async () => {
    const holder = await createAccount(server, next());
    const { status, body } = await ask();
    expect([status, body]).toEqual([202, { accepted: true }]);
    expect(await subjectsTo(holder.email)).toEqual(['You already have an account']);
    expect(await AddressChange.count({ where: { userId: user.id } })).toBe(0);
  });

  it('gives way to an account confirmed meanwhile, and takes the place of one never confirmed', async () => {
    await ask();
    const token = await tokenMailedTo(next());
    const holder = await createAccount(server, next());
    expect((await confirm(token)).body.error.code).toBe('conflict');
    await holder.update({ emailVerifiedAt: null });
    expect((await confirm(token)).status).toBe(200);
    expect(await User.findByPk(holder.id)).toBeNull();
  });

  it('is called off by a new password chosen at the old address', async () => {
    await ask();
    const token = await tokenMailedTo(next());
    await browser.post('/api/account/request-reset', { email: user.email });
    const reset = { token: await tokenMailedTo(user.email), password: newPassword };
    expect((await (await openBrowser(server.app)).post('/api/account/reset', reset)).status).toBe(200);
    expect((await confirm(token)).body.error.code).toBe('gone');
  });

  it.each<[string, () => Promise<{ status: number; body: { error: { fields: object } } }>, string]>([
    ['a wrong password', () => ask(next(), 'not this one'), 'currentPassword'],
    ['what is no address', () => ask('nowhere'), 'email'],
    ['the address it has', () => ask(user.email.toUpperCase()), 'email'],
  ])('refuses %s beside the field', async (_name, send, field) => {
    const { status, body } = await send();
    expect([status, Object.keys(body.error.fields)]).toEqual([422, [field]]);
    expect(await AddressChange.count({ where: { userId: user.id } })).toBe(0);
  });

  it('is for who is signed in; the link is for who has the mail', async () => {
    const visitor = await openBrowser(server.app);
    const body = { email: next(), currentPassword: goodPassword };
    expect((await visitor.post('/api/account/change-email', body)).status).toBe(401);
    expect((await confirm('x'.repeat(43))).status).toBe(410);
    expect((await confirm('short')).status).toBe(422);
  });
});
