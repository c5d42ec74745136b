import { OutboxMail, RecoveryCode, SecondFactor, TrailEntry, TrailText, User } from '@/server/db/models';

import { createAccount, goodPassword, signInAs } from '../support/accounts';
import { type Browser, lastMailTo, openBrowser } from '../support/browser';
import { setUpCodes } from '../support/codes';
import { startTestServer, type TestServer } from '../support/testServer';

let server: TestServer;
let steward: Browser;
let stewardId: string;
let count = 0;

beforeAll(async () => {
  server = await startTestServer();
  stewardId = (await createAccount(server, 'steward@example.org', { role: 'steward' })).id;
  steward = await openBrowser(server.app);
  await signInAs(steward, 'steward@example.org');
});
afterAll(() => server.stop());

const path = '/api/steward/people';
const proof = { currentPassword: goodPassword, reason: 'Asked for it by telephone.' };

async function person(role: User['role'], isConfirmed = true): Promise<{ user: User; browser: Browser }> {
  count += 1;
  const user = await createAccount(server, `person${count}@example.org`, { role, isConfirmed });
  const browser = await openBrowser(server.app);
  if (isConfirmed) await signInAs(browser, user.email);
  return { user, browser };
}

const appoint = (email: string, role = 'moderator', currentPassword = goodPassword) =>
  steward.post(`${path}/appoint`, { email, role, currentPassword });
const act = (userId: string, verb: string, body: object = proof) =>
  steward.post(`${path}/${userId}/${verb}`, body);
const codeOf = ({ status, body }: { status: number; body: { error?: { code: string } } }) =>
  body.error?.code ?? status;
const trailOf = (userId: string) => TrailEntry.findAll({ where: { subjectId: userId }, order: ['id'] });

describe('appointing', () => {
  it('gives the role at once, in sign-ins that are open, with mail and trail', async () => {
    const { user, browser } = await person('owner');
    expect((await browser.get('/api/screening')).status).toBe(403);
    expect((await appoint(user.email.toUpperCase())).status).toBe(200);
    expect((await browser.get('/api/screening')).status).toBe(200);
    expect((await lastMailTo(user.email))?.subject).toBe('You are a moderator of Ebbline now');
    const [entry] = await trailOf(user.id);
    expect(entry).toMatchObject({
      ...{ action: 'appointed', actorId: stewardId, actorRole: 'steward', subjectType: 'account' },
      details: { role: 'moderator', from: 'owner' },
    });
    expect(JSON.stringify(entry)).not.toContain('@');
  });

  it('asks for the steward’s own password', async () => {
    const { user } = await person('owner');
    const { status, body } = await appoint(user.email, 'moderator', 'not this one');
    expect([status, Object.keys(body.error.fields)]).toEqual([422, ['currentPassword']]);
    expect((await user.reload()).role).toBe('owner');
  });

  it('refuses an address without an account, one not confirmed, and fields that are missing', async () => {
    const { user } = await person('owner', false);
    expect((await appoint('nobody@example.org')).body.error.fields.email).toMatch(/No account/);
    expect((await appoint(user.email)).body.error.fields.email).toMatch(/not been confirmed/);
    expect((await appoint(user.email, 'owner')).status).toBe(422);
    const { body } = await steward.post(`${path}/appoint`);
    expect(Object.keys(body.error.fields).sort()).toEqual(['currentPassword', 'email', 'role']);
  });

  it('refuses a role that is held, a locked account, and oneself', async () => {
    const { user } = await person('moderator');
    expect(codeOf(await appoint(user.email))).toBe('conflict');
    await user.update({ lockedAt: new Date() });
    expect(codeOf(await appoint(user.email, 'steward'))).toBe('conflict');
    expect(codeOf(await appoint('steward@example.org'))).toBe('conflict');
  });

  it('answers others alike, whether the address has an account or not', async () => {
    const { user } = await person('owner');
    for (const role of ['owner', 'moderator'] as const) {
      const { browser } = await person(role);
      const ask = (email: string) =>
        browser.post(`${path}/appoint`, { email, role: 'moderator', currentPassword: goodPassword });
      const [known, unknown] = [await ask(user.email), await ask('nobody@example.org')];
      expect([known.status, known.text]).toEqual([403, unknown.text]);
      const find = (who: string) => browser.post(`${path}/find`, { who });
      expect((await find(user.email)).text).toBe((await find('nobody@example.org')).text);
    }
  });
});

describe('taking a role away', () => {
  it('holds at once, though the access token still says moderator', async () => {
    const { user, browser } = await person('moderator');
    expect((await browser.get('/api/screening')).status).toBe(200);
    expect((await act(user.id, 'dismiss')).status).toBe(200);
    const refused = await browser.get('/api/screening');
    expect([refused.status, refused.body.error.code]).toEqual([403, 'notAllowed']);
    expect((await browser.get('/api/banks')).status).toBe(200);
    expect((await lastMailTo(user.email))?.subject).toBe('You are not a moderator of Ebbline any more');
  });

  it('keeps the reason beside the trail, where it can be erased', async () => {
    const { user } = await person('moderator');
    await act(user.id, 'dismiss');
    const [entry] = await trailOf(user.id);
    expect(entry?.details).toMatchObject({ from: 'moderator' });
    expect(JSON.stringify(entry)).not.toContain(proof.reason);
    expect((await TrailText.findOne({ where: { trailId: entry!.id } }))?.text).toBe(proof.reason);
  });

  it('refuses an owner, oneself, nobody, and what is missing', async () => {
    const { user } = await person('owner');
    expect(codeOf(await act(user.id, 'dismiss'))).toBe('conflict');
    expect(codeOf(await act(stewardId, 'dismiss'))).toBe('conflict');
    expect(codeOf(await act('6f9619ff-8b86-4011-b42d-00c04fc964ff', 'dismiss'))).toBe('notFound');
    expect(codeOf(await act('x', 'dismiss'))).toBe('notFound');
    const { body } = await act(user.id, 'dismiss', {});
    expect(Object.keys(body.error.fields).sort()).toEqual(['currentPassword', 'reason']);
  });

  it('leaves a steward when two take the role from each other at the same moment', async () => {
    const one = await person('steward');
    const other = await person('steward');
    const answers = await Promise.all([
      one.browser.post(`${path}/${other.user.id}/dismiss`, proof),
      other.browser.post(`${path}/${one.user.id}/dismiss`, proof),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 403]);
    const roles = [(await one.user.reload()).role, (await other.user.reload()).role];
    expect(roles.sort()).toEqual(['owner', 'steward']);
  });
});

describe('locking an account', () => {
  it('ends its sign-ins at once, keeps it out, and tells its owner why', async () => {
    const { user, browser } = await person('owner');
    const refreshToken = browser.cookie('ebblineRefresh');
    expect((await act(user.id, 'lock')).status).toBe(200);
    expect((await browser.get('/api/banks')).status).toBe(401);
    expect(codeOf(await browser.post('/api/account/refresh'))).toBe('sessionEnded');
    const other = await openBrowser(server.app);
    other.setCookie('ebblineRefresh', refreshToken);
    expect(codeOf(await other.post('/api/account/refresh'))).toBe('sessionEnded');
    expect(codeOf(await signInAs(other, user.email))).toBe('accountLocked');
    expect(codeOf(await signInAs(other, user.email, 'not the password'))).toBe('wrongCredentials');
    const mail = await lastMailTo(user.email);
    expect(mail?.subject).toBe('Your account is locked');
    expect(mail?.text).toContain(proof.reason);
    expect((await trailOf(user.id)).map(({ action }) => action)).toEqual(['locked']);
  });

  it('is undone by unlocking, with mail and trail', async () => {
    const { user } = await person('moderator');
    await act(user.id, 'lock');
    expect((await act(user.id, 'unlock')).status).toBe(200);
    const again = await openBrowser(server.app);
    expect((await signInAs(again, user.email)).body.user.role).toBe('moderator');
    expect((await lastMailTo(user.email))?.subject).toBe('Your account is open again');
    expect((await trailOf(user.id)).map(({ action }) => action)).toEqual(['locked', 'unlocked']);
  });

  it('refuses what is so already, oneself, nobody and a wrong password', async () => {
    const { user } = await person('owner');
    expect(codeOf(await act(user.id, 'unlock'))).toBe('conflict');
    await act(user.id, 'lock');
    expect(codeOf(await act(user.id, 'lock'))).toBe('conflict');
    expect(codeOf(await act(stewardId, 'lock'))).toBe('conflict');
    for (const verb of ['lock', 'unlock']) {
      expect(codeOf(await act('6f9619ff-8b86-4011-b42d-00c04fc964ff', verb))).toBe('notFound');
      const wrong = await act(user.id, verb, { ...proof, currentPassword: 'not this one' });
      expect(Object.keys(wrong.body.error.fields)).toEqual(['currentPassword']);
    }
  });

  it('does not let a locked steward act on', async () => {
    const { user, browser } = await person('steward');
    await act(user.id, 'lock');
    expect((await browser.post(`${path}/find`, { who: 'a@example.org' })).status).toBe(401);
  });
});

describe('clearing a second factor', () => {
  it('lets the password alone sign in again, with the codes void, mail and trail', async () => {
    const { user, browser } = await person('moderator');
    await setUpCodes(server, browser);
    expect((await act(user.id, 'clear-second-factor')).status).toBe(200);
    expect(await SecondFactor.findByPk(user.id)).toBeNull();
    expect(await RecoveryCode.count({ where: { userId: user.id } })).toBe(0);
    expect((await browser.get('/api/screening')).status).toBe(401);
    const again = await openBrowser(server.app);
    expect((await signInAs(again, user.email)).body).toMatchObject({
      asksForCode: false,
      user: { role: 'moderator', secondFactor: 'off' },
    });
    const mail = await lastMailTo(user.email);
    expect(mail?.subject).toBe('The code at sign-in was cleared by a steward');
    expect(mail?.text).toContain(proof.reason);
    const entry = (await trailOf(user.id)).at(-1);
    expect(entry).toMatchObject({ action: 'secondFactorCleared', actorId: stewardId });
    expect(JSON.stringify(entry)).not.toContain(proof.reason);
  });

  it('refuses where none is on, oneself, nobody, a wrong password and what is missing', async () => {
    const { user, browser } = await person('moderator');
    const begin = { currentPassword: goodPassword };
    const clear = (userId: string, body?: object) => act(userId, 'clear-second-factor', body);
    expect(codeOf(await clear(user.id))).toBe('conflict');
    await browser.post('/api/account/second-factor/begin', begin);
    expect(codeOf(await clear(user.id))).toBe('conflict');
    await setUpCodes(server, browser);
    const wrong = await clear(user.id, { ...proof, currentPassword: 'not this one' });
    expect(Object.keys(wrong.body.error.fields)).toEqual(['currentPassword']);
    const missing = await clear(user.id, {});
    expect(Object.keys(missing.body.error.fields).sort()).toEqual(['currentPassword', 'reason']);
    expect(codeOf(await clear('6f9619ff-8b86-4011-b42d-00c04fc964ff'))).toBe('notFound');
    expect(codeOf(await clear(stewardId))).toBe('conflict');
    expect(await SecondFactor.findByPk(user.id)).not.toBeNull();
    expect(await RecoveryCode.count({ where: { userId: user.id } })).toBe(10);
  });
});

describe('reading people', () => {
  it('lists moderators, stewards and locked owners, and who has a second step', async () => {
    const { user } = await person('moderator');
    await SecondFactor.create({
      ...{ userId: user.id, sealedSecret: 'x', confirmedAt: new Date(), createdAt: new Date() },
    });
    const { user: locked } = await person('owner');
    const { user: plain } = await person('owner');
    await act(locked.id, 'lock');
    const { body } = await steward.get(path);
    const staff = Object.fromEntries(body.staff.map((one: { id: string }) => [one.id, one]));
    expect(staff[user.id]).toMatchObject({ email: user.email, role: 'moderator', hasSecondFactor: true });
    expect(staff[stewardId]).toMatchObject({ role: 'steward', hasSecondFactor: false, lockedAt: null });
    expect(body.locked.map(({ id }: { id: string }) => id)).toContain(locked.id);
    expect(JSON.stringify(body)).not.toContain(plain.email);
  });

  it('finds an account by its address, and by its number without telling an owner’s address', async () => {
    const { user } = await person('owner');
    const find = async (who: string) => (await steward.post(`${path}/find`, { who })).body.person;
    expect(await find(` ${user.email} `)).toMatchObject({ id: user.id, email: user.email });
    expect(await find(user.id)).toMatchObject({ id: user.id, email: null, role: 'owner' });
    expect(await find('nobody@example.org')).toBeNull();
    expect((await steward.post(`${path}/find`, { who: '' })).status).toBe(422);
  });

  it('writes no address of anybody into the trail', async () => {
    const addresses = (await User.findAll()).map(({ email }) => email);
    const trail = JSON.stringify(await TrailEntry.findAll());
    expect(addresses.filter((address) => trail.includes(address))).toEqual([]);
    expect(await OutboxMail.count()).toBeGreaterThan(0);
  });
});
