import { RecoveryCode, SecondFactor, Session, TrailEntry, type User } from '@/server/db/models';
import { openSecret, sealSecret } from '@/server/secondFactor/sealSecret';
import { closedMinutes } from '@/server/secondFactor/spendCode';

import { createAccount, goodPassword, signInAs } from '../support/accounts';
import { type Browser, lastMailTo, openBrowser } from '../support/browser';
import { codeAt, setUpCodes, wrongCodeAt } from '../support/codes';
import { startTestServer, type TestServer } from '../support/testServer';

const start = Date.parse('2026-12-01T12:00:00Z');
const path = '/api/account/second-factor';
let server: TestServer;
let browser: Browser;
let user: User;
let secret: string;
let recoveryCodes: string[];
let count = 0;

beforeAll(async () => (server = await startTestServer()));
afterAll(() => server.stop());
beforeEach(async () => {
  waitTo(0);
  count += 1;
  user = await createAccount(server, `code${count}@example.org`, { role: 'moderator' });
  browser = await openBrowser(server.app);
  await signInAs(browser, user.email);
  ({ secret, recoveryCodes } = await setUpCodes(server, browser));
});

function waitTo(seconds: number) {
  server.setNow(new Date(start + seconds * 1000).toISOString());
}

const codeNow = () => codeAt(secret, server.deps.clock());
const wrongCode = () => wrongCodeAt(secret, server.deps.clock());

/** Another browser after the password. */
async function halfSignedIn(): Promise<Browser> {
  const other = await openBrowser(server.app);
  const { status, body } = await signInAs(other, user.email);
  expect([status, body.asksForCode, body.user]).toEqual([200, true, null]);
  return other;
}

const enter = (at: Browser, code: string) => at.post('/api/account/sign-in-code', { code });
const codeOf = ({ status, body }: { status: number; body: { error?: { code: string } } }) =>
  body.error?.code ?? status;

describe('setting up', () => {
  it('counts once a code has confirmed it, and says so', async () => {
    const { body } = await browser.get(path);
    expect(body).toEqual({
      isOn: true,
      since: '2026-12-01T12:00:00.000Z',
      recoveryCodesLeft: 10,
      isRequired: false,
    });
    const session = await browser.get('/api/account/session');
    expect(session.body.user.secondFactor).toBe('on');
    expect((await lastMailTo(user.email))?.subject).toBe('Signing in asks for a code from now on');
    const actions = await TrailEntry.findAll({ where: { subjectId: user.id } });
    expect(actions.map(({ action }) => action)).toEqual(['secondFactorOn']);
  });

  it('asks for nothing at sign-in while it is not confirmed', async () => {
    const owner = await createAccount(server, `waits${count}@example.org`);
    const other = await openBrowser(server.app);
    await signInAs(other, owner.email);
    expect((await other.post(`${path}/begin`, { currentPassword: goodPassword })).status).toBe(200);
    expect((await other.get(path)).body).toMatchObject({ isOn: false, since: null, recoveryCodesLeft: 0 });
    const { body } = await signInAs(await openBrowser(server.app), owner.email);
    expect([body.asksForCode, body.user.email]).toEqual([false, owner.email]);
  });

  it('gives the secret as text, as a link and as a QR code of the link', async () => {
    const owner = await createAccount(server, `offer${count}@example.org`);
    const other = await openBrowser(server.app);
    await signInAs(other, owner.email);
    const { body } = await other.post(`${path}/begin`, { currentPassword: goodPassword });
    expect(body.secret).toMatch(/^[A-Z2-7]{32}$/);
    const link = new URL(body.uri);
    expect(link.searchParams.get('secret')).toBe(body.secret);
    expect(decodeURIComponent(link.pathname)).toContain(owner.email);
    // The finder pattern of every QR code (ISO/IEC 18004): seven dark squares at the upper left.
    expect(body.qr.path).toMatch(/^M0 0h7v1h-7z/);
    expect(body.qr.size).toBeGreaterThanOrEqual(21);
  });

  it('refuses a wrong password, a wrong code, and a set-up over one that is on', async () => {
    const owner = await createAccount(server, `refused${count}@example.org`);
    const other = await openBrowser(server.app);
    await signInAs(other, owner.email);
    expect(codeOf(await other.post(`${path}/confirm`, { code: '123456' }))).toBe('conflict');
    const wrong = await other.post(`${path}/begin`, { currentPassword: 'not this one' });
    expect(Object.keys(wrong.body.error.fields)).toEqual(['currentPassword']);
    const { body } = await other.post(`${path}/begin`, { currentPassword: goodPassword });
    const refused = await other.post(`${path}/confirm`, {
      code: await wrongCodeAt(body.secret, server.deps.clock()),
    });
    expect([refused.status, Object.keys(refused.body.error.fields)]).toEqual([422, ['code']]);
    expect(codeOf(await browser.post(`${path}/begin`, { currentPassword: goodPassword }))).toBe('conflict');
    expect(codeOf(await browser.post(`${path}/begin`))).toBe('invalid');
  });

  it('is for whoever is signed in', async () => {
    const visitor = await openBrowser(server.app);
    expect((await visitor.get(path)).status).toBe(401);
    for (const verb of ['begin', 'confirm', 'recovery-codes', 'turn-off'])
      expect((await visitor.post(`${path}/${verb}`, {})).status).toBe(401);
  });

  it('ends every other sign-in, which was made without a code', async () => {
    const owner = await createAccount(server, `others${count}@example.org`);
    const [one, other] = [await openBrowser(server.app), await openBrowser(server.app)];
    await signInAs(one, owner.email);
    await signInAs(other, owner.email);
    await setUpCodes(server, one);
    expect((await other.get('/api/account/notices')).status).toBe(401);
    expect((await one.get('/api/account/notices')).status).toBe(200);
  });

  it('stores neither the secret nor the recovery codes as they are', async () => {
    const rows = JSON.stringify([
      await SecondFactor.findByPk(user.id),
      await RecoveryCode.findAll({ where: { userId: user.id } }),
    ]);
    expect(rows).not.toContain(secret);
    for (const code of recoveryCodes) {
      expect(rows).not.toContain(code);
      expect(rows).not.toContain(code.replace('-', ''));
    }
  });
});

describe('a sealed secret', () => {
  const sealed = sealSecret('JBSWY3DPEHPK3PXP', 'one', 's'.repeat(32));

  it('opens for its account with the server’s secret', () => {
    expect(openSecret(sealed, 'one', 's'.repeat(32))).toBe('JBSWY3DPEHPK3PXP');
  });

  it('opens for no other account, by no other secret, and not altered', () => {
    expect(() => openSecret(sealed, 'two', 's'.repeat(32))).toThrow();
    expect(() => openSecret(sealed, 'one', 't'.repeat(32))).toThrow();
    const [iv, tag, text] = sealed.split('.');
    const other = text!.startsWith('A') ? `B${text!.slice(1)}` : `A${text!.slice(1)}`;
    expect(() => openSecret([iv, tag, other].join('.'), 'one', 's'.repeat(32))).toThrow();
    expect(() => openSecret('x', 'one', 's'.repeat(32))).toThrow();
  });
});

describe('signing in with a code', () => {
  it('gives no session after the password, and one after the code', async () => {
    const other = await halfSignedIn();
    expect(other.cookie('ebblineAccess')).toBeUndefined();
    expect(other.cookie('ebblineRefresh')).toBeUndefined();
    expect((await other.get('/api/account/notices')).status).toBe(401);
    waitTo(30);
    const { status, body } = await enter(other, await codeNow());
    expect([status, body.user.email]).toEqual([200, user.email]);
    expect((await other.get('/api/screening')).status).toBe(200);
    expect(other.cookie('ebblineStep')).toBeUndefined();
  });

  it('takes the code with a blank in it, and one of the step before or after', async () => {
    waitTo(60);
    const early = await codeAt(secret, new Date(start + 30_000));
    expect((await enter(await halfSignedIn(), `${early.slice(0, 3)} ${early.slice(3)}`)).status).toBe(200);
    const late = await codeAt(secret, new Date(start + 90_000));
    expect((await enter(await halfSignedIn(), late)).status).toBe(200);
  });

  it('takes a code once, whoever sends it again, and the one of the set-up not at all', async () => {
    const again = await enter(await halfSignedIn(), await codeNow());
    expect(codeOf(again)).toBe('invalid');
    waitTo(30);
    const code = await codeNow();
    expect((await enter(await halfSignedIn(), code)).status).toBe(200);
    expect(codeOf(await enter(await halfSignedIn(), code))).toBe('invalid');
  });

  it('takes a code once when two send it at the same moment', async () => {
    waitTo(30);
    const code = await codeNow();
    const both = [await halfSignedIn(), await halfSignedIn()];
    const answers = await Promise.all(both.map((one) => enter(one, code)));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 422]);
  });

  it('answers a wrong code, a used one and a used recovery code alike', async () => {
    waitTo(30);
    await enter(await halfSignedIn(), recoveryCodes[0]!);
    const other = await halfSignedIn();
    const used = await codeNow();
    await enter(await halfSignedIn(), used);
    const texts = [];
    for (const code of [await wrongCode(), used, recoveryCodes[0]!, 'what'])
      texts.push((await enter(other, code)).text);
    expect(new Set(texts).size).toBe(1);
  });

  it('is not to be had without the password, nor long after it, nor after the password changed', async () => {
    const visitor = await openBrowser(server.app);
    expect(codeOf(await enter(visitor, await codeNow()))).toBe('gone');
    visitor.setCookie('ebblineStep', 'x');
    expect(codeOf(await enter(visitor, await codeNow()))).toBe('gone');
    const late = await halfSignedIn();
    const step = late.cookie('ebblineStep');
    waitTo(601);
    visitor.setCookie('ebblineStep', step);
    expect(codeOf(await enter(visitor, await codeNow()))).toBe('gone');
    waitTo(30);
    await user.reload();
    await user.update({ passwordHash: 'changed' });
    expect(codeOf(await enter(late, await codeNow()))).toBe('gone');
  });

  it('can’t be got round with an access token as the step’s, or the step’s as an access token', async () => {
    const other = await halfSignedIn();
    other.setCookie('ebblineAccess', other.cookie('ebblineStep'));
    expect((await other.get('/api/account/notices')).status).toBe(401);
    const visitor = await openBrowser(server.app);
    visitor.setCookie('ebblineStep', browser.cookie('ebblineAccess'));
    waitTo(30);
    expect(codeOf(await enter(visitor, await codeNow()))).toBe('gone');
  });

  it('asks for the code and for the CSRF token', async () => {
    expect(Object.keys((await enter(await halfSignedIn(), '')).body.error.fields)).toEqual(['code']);
    const { default: supertest } = await import('supertest');
    const bare = await supertest(server.app).post('/api/account/sign-in-code').send({ code: '123456' });
    expect(bare.body.error.code).toBe('csrf');
  });

  it('leaves the chain of refresh tokens as it is', async () => {
    const other = await halfSignedIn();
    waitTo(30);
    await enter(other, await codeNow());
    expect((await other.post('/api/account/refresh')).body.user.secondFactor).toBe('on');
    expect((await other.post('/api/account/refresh')).status).toBe(200);
    expect(await Session.count({ where: { userId: user.id, revokedAt: null } })).toBeGreaterThan(1);
  });
});

describe('guessing', () => {
  it('ends after five wrong codes, for all who know the password, until a quarter of an hour is over', async () => {
    waitTo(30);
    const wrong = await wrongCode();
    for (let tries = 0; tries < 5; tries += 1)
      expect(codeOf(await enter(await halfSignedIn(), wrong))).toBe('invalid');
    expect((await lastMailTo(user.email))?.subject).toBe('Several wrong codes for your account');
    expect(codeOf(await enter(await halfSignedIn(), await codeNow()))).toBe('tooManyRequests');
    expect(codeOf(await enter(await halfSignedIn(), recoveryCodes[0]!))).toBe('tooManyRequests');
    waitTo(30 + closedMinutes * 60);
    expect((await enter(await halfSignedIn(), await codeNow())).status).toBe(200);
  });

  it('counts wrong codes that come at the same moment, and is forgotten after a right one', async () => {
    waitTo(30);
    const wrong = await wrongCode();
    const many = await Promise.all(Array.from({ length: 4 }, halfSignedIn));
    await Promise.all(many.map((one) => enter(one, wrong)));
    expect((await SecondFactor.findByPk(user.id))?.failures).toBe(4);
    await enter(await halfSignedIn(), await codeNow());
    expect((await SecondFactor.findByPk(user.id))?.failures).toBe(0);
  });
});

describe('recovery codes', () => {
  it('are ten, and sign in once each, in any case and without the dash', async () => {
    expect(new Set(recoveryCodes).size).toBe(10);
    for (const code of recoveryCodes) expect(code).toMatch(/^[0-9a-z]{5}-[0-9a-z]{5}$/);
    const typed = recoveryCodes[3]!.replace('-', ' ').toUpperCase();
    expect((await enter(await halfSignedIn(), typed)).status).toBe(200);
    expect((await lastMailTo(user.email))?.subject).toBe('A recovery code was used');
    expect(codeOf(await enter(await halfSignedIn(), recoveryCodes[3]!))).toBe('invalid');
    expect((await browser.get(path)).body.recoveryCodesLeft).toBe(9);
  });

  it('sign in once when two send one at the same moment', async () => {
    const both = [await halfSignedIn(), await halfSignedIn()];
    const answers = await Promise.all(both.map((one) => enter(one, recoveryCodes[0]!)));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 422]);
  });

  it('are no good for another account', async () => {
    const other = await createAccount(server, `another${count}@example.org`);
    const theirs = await openBrowser(server.app);
    await signInAs(theirs, other.email);
    await setUpCodes(server, theirs);
    const half = await openBrowser(server.app);
    await signInAs(half, other.email);
    expect(codeOf(await enter(half, recoveryCodes[0]!))).toBe('invalid');
  });

  it('are replaced by fresh ones for password and code, and the old ones are void', async () => {
    waitTo(30);
    const wrong = await browser.post(`${path}/recovery-codes`, {
      currentPassword: 'not this one',
      code: await codeNow(),
    });
    expect(Object.keys(wrong.body.error.fields)).toEqual(['currentPassword']);
    const proof = { currentPassword: goodPassword, code: await codeNow() };
    const { status, body } = await browser.post(`${path}/recovery-codes`, proof);
    expect(status).toBe(200);
    expect(body.recoveryCodes.filter((code: string) => recoveryCodes.includes(code))).toEqual([]);
    expect(codeOf(await enter(await halfSignedIn(), recoveryCodes[1]!))).toBe('invalid');
    expect((await enter(await halfSignedIn(), body.recoveryCodes[1])).status).toBe(200);
  });
});

describe('turning it off', () => {
  it('takes password and code, and the password alone signs in again', async () => {
    waitTo(30);
    const code = await codeNow();
    const noCode = await browser.post(`${path}/turn-off`, { currentPassword: goodPassword });
    expect(Object.keys(noCode.body.error.fields)).toEqual(['code']);
    const noPassword = await browser.post(`${path}/turn-off`, { currentPassword: 'not this one', code });
    expect(Object.keys(noPassword.body.error.fields)).toEqual(['currentPassword']);
    const proof = { currentPassword: goodPassword, code: await wrongCode() };
    expect(codeOf(await browser.post(`${path}/turn-off`, proof))).toBe('invalid');
    expect((await browser.post(`${path}/turn-off`, { ...proof, code })).status).toBe(200);
    expect((await lastMailTo(user.email))?.subject).toBe('Signing in asks for no code any more');
    const { body } = await signInAs(await openBrowser(server.app), user.email);
    expect([body.asksForCode, body.user.secondFactor]).toEqual([false, 'off']);
    expect(await RecoveryCode.count({ where: { userId: user.id } })).toBe(0);
    expect(codeOf(await browser.post(`${path}/turn-off`, { ...proof, code: '123456' }))).toBe('conflict');
  });
});
