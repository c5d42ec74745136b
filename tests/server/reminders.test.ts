import { randomUUID } from 'node:crypto';

import { Bank, BankEvent, Check, User } from '@/server/db/models';
import { linkToken } from '@/server/mail/linkTokens';

import { checkInput, createBankOf, createCellType } from '../support/bankFixtures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let other: TestClient;
let visitor: TestClient;
let bankId: string;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  owner = await server.client('owner');
  other = await server.client('owner');
  visitor = await server.client();
});
afterAll(() => server.stop());
beforeEach(async () => (bankId = await createBankOf(owner)));

const path = () => `/api/banks/${bankId}/reminder`;
const submit = (testedOn = '2026-10-03') =>
  owner.send('post', `/api/banks/${bankId}/checks`, checkInput({ reading: { testedOn } }));
const set = (body: object, client = owner) => client.send('put', path(), body);

describe('GET /api/banks/:bankId/reminder', () => {
  it('is due a year after the last check', async () => {
    await submit('2025-09-20');
    await submit('2026-10-03');
    const { status, body } = await owner.get(path());
    expect(status).toBe(200);
    expect(body).toEqual({
      bankId,
      isOn: true,
      dueOn: '2027-10-03',
      ownDueOn: null,
      lastTestedOn: '2026-10-03',
      isEnded: false,
      isMailed: true,
    });
  });

  it('knows no day before the first check', async () => {
    expect((await owner.get(path())).body).toMatchObject({ dueOn: null, lastTestedOn: null });
  });

  it('does not count a check that was withdrawn', async () => {
    const check = await submit();
    await owner.send('post', `/api/checks/${check.body.id}/withdraw`, { version: 1 });
    expect((await owner.get(path())).body.dueOn).toBeNull();
  });

  it.each(['sold', 'retired'])('has nothing due for a bank that was %s', async (kind) => {
    await submit();
    await BankEvent.create({ bankId, happenedOn: '2026-11-01', kind: kind as 'sold', note: '' });
    expect((await owner.get(path())).body).toMatchObject({ dueOn: null, isEnded: true });
  });

  it('is its owner’s alone', async () => {
    expect((await visitor.get(path())).status).toBe(401);
    expect((await other.get(path())).status).toBe(404);
    expect((await owner.get(`/api/banks/${randomUUID()}/reminder`)).status).toBe(404);
  });
});

describe('PUT /api/banks/:bankId/reminder', () => {
  it('takes a day of the owner’s own, which holds until the next check', async () => {
    await submit('2025-10-03');
    const { status, body } = await set({ isOn: true, dueOn: '2027-01-15' });
    expect(status).toBe(200);
    expect(body).toMatchObject({ dueOn: '2027-01-15', ownDueOn: '2027-01-15' });
    await submit('2026-11-28');
    expect((await owner.get(path())).body).toMatchObject({ dueOn: '2027-11-28', ownDueOn: null });
  });

  it('goes back to the year after the last check, and can be switched off and on', async () => {
    await submit();
    await set({ isOn: true, dueOn: '2027-01-15' });
    expect((await set({ isOn: false, dueOn: null })).body).toMatchObject({
      isOn: false,
      dueOn: '2027-10-03',
    });
    expect((await set({ isOn: true, dueOn: null })).body.isOn).toBe(true);
  });

  it('takes a day for a bank without a check', async () => {
    expect((await set({ isOn: true, dueOn: '2027-01-15' })).body.dueOn).toBe('2027-01-15');
  });

  it.each<[string, object, string]>([
    ['a day that is over', { isOn: true, dueOn: '2026-11-30' }, 'dueOn'],
    ['a day years ahead', { isOn: true, dueOn: '2031-12-02' }, 'dueOn'],
    ['what is no day', { isOn: true, dueOn: '2027-02-30' }, 'dueOn'],
    ['no choice', { dueOn: null }, 'isOn'],
  ])('refuses %s beside the field', async (_name, body, field) => {
    const answer = await set(body);
    expect([answer.status, Object.keys(answer.body.error.fields)]).toEqual([422, [field]]);
  });

  it('takes today and the last day of five years', async () => {
    for (const dueOn of ['2026-12-01', '2031-12-01'])
      expect((await set({ isOn: true, dueOn })).status).toBe(200);
  });

  it('is its owner’s alone', async () => {
    const body = { isOn: false, dueOn: null };
    expect((await set(body, visitor)).status).toBe(401);
    expect((await set(body, other)).status).toBe(404);
    expect((await owner.send('put', `/api/banks/${randomUUID()}/reminder`, body)).status).toBe(404);
    expect((await owner.get(path())).body.isOn).toBe(true);
  });
});

describe('GET /api/banks/:bankId/reminder.ics', () => {
  it('is a calendar file of the day, to keep', async () => {
    await submit();
    const { status, headers, text } = await owner.get(`${path()}.ics`);
    expect(status).toBe(200);
    expect(headers['content-type']).toBe('text/calendar; charset=utf-8');
    expect(headers['content-disposition']).toBe('attachment; filename=check-2027-10-03.ics');
    expect(text).toContain('DTSTART;VALUE=DATE:20271003\r\n');
    expect(text).toContain('SUMMARY:Capacity check: Barn\r\n');
  });

  it('answers 409 where no day is known, 404 to others, 401 to visitors', async () => {
    expect((await owner.get(`${path()}.ics`)).status).toBe(409);
    expect((await other.get(`${path()}.ics`)).status).toBe(404);
    expect((await visitor.get(`${path()}.ics`)).status).toBe(401);
  });
});

describe('POST /api/reminders/later', () => {
  const tokenFor = (dueOn: string, secret = server.deps.config.secret) =>
    linkToken({ may: 'remindLater', bankId, dueOn }, secret);
  const later = (token: string, client = visitor) => client.send('post', '/api/reminders/later', { token });

  it('puts a due reminder off by a month, for whoever has the mail', async () => {
    await submit('2025-12-01');
    const { status, body } = await later(tokenFor('2026-12-01'));
    expect([status, body]).toEqual([200, { dueOn: '2027-01-01' }]);
    expect((await owner.get(path())).body).toMatchObject({ dueOn: '2027-01-01', ownDueOn: '2027-01-01' });
  });

  it('changes nothing the second time, also days later', async () => {
    await submit('2025-12-01');
    await later(tokenFor('2026-12-01'));
    server.setNow('2026-12-05T12:00:00Z');
    expect((await later(tokenFor('2026-12-01'))).body).toEqual({ dueOn: '2027-01-01' });
    server.setNow('2026-12-01T12:00:00Z');
  });

  it('changes nothing after a check has been made', async () => {
    await submit('2025-12-01');
    await submit('2026-11-30');
    expect((await later(tokenFor('2026-12-01'))).body).toEqual({ dueOn: '2027-11-30' });
  });

  it('switches nothing on again', async () => {
    await submit('2025-12-01');
    await set({ isOn: false, dueOn: null });
    expect((await later(tokenFor('2026-12-01'))).body).toEqual({ dueOn: null });
    expect((await owner.get(path())).body.isOn).toBe(false);
  });

  it('refuses tokens that are altered, of another kind, of another server, or none', async () => {
    await submit('2025-12-01');
    const token = tokenFor('2026-12-01');
    const [, signature] = token.split('.');
    const otherBody = Buffer.from(JSON.stringify({ may: 'remindLater', bankId, dueOn: '2026-12-02' }));
    const unsubscribe = linkToken(
      { may: 'unsubscribe', userId: owner.userId!, kind: 'reminders' },
      server.deps.config.secret,
    );
    for (const bad of [
      `${token.slice(0, -1)}${token.endsWith('A') ? 'B' : 'A'}`,
      `${otherBody.toString('base64url')}.${signature}`,
      tokenFor('2026-12-01', 'another secret of thirty-two characters'),
      unsubscribe,
      'x'.repeat(60),
      `${'x'.repeat(40)}.`,
    ])
      expect((await later(bad)).status).toBe(404);
    expect((await later('short')).status).toBe(422);
    expect((await owner.get(path())).body.ownDueOn).toBeNull();
  });

  it('answers 410 when the bank or its owner is not there any more', async () => {
    const token = tokenFor('2026-12-01');
    await User.update({ erasedAt: server.deps.clock() }, { where: { id: owner.userId! } });
    expect((await later(token)).status).toBe(410);
    await User.update({ erasedAt: null }, { where: { id: owner.userId! } });
    await Check.destroy({ where: { bankId } });
    await Bank.destroy({ where: { id: bankId } });
    expect((await later(token)).status).toBe(410);
  });
});
