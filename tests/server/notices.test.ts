import nodemailer from 'nodemailer';
import supertest from 'supertest';

import { OutboxMail, User } from '@/server/db/models';
import { sendQueuedMail } from '@/server/mail/sendQueuedMail';

import { checkInput, createBankOf, createCellType } from '../support/bankFixtures';
import { startTestServer, type TestClient, type TestServer } from '../support/testServer';

let server: TestServer;
let owner: TestClient;
let moderator: TestClient;

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  moderator = await server.client('moderator');
});
afterAll(() => server.stop());
beforeEach(async () => (owner = await server.client('owner')));

let minutes = 0;

async function ask(): Promise<OutboxMail | null> {
  const bankId = await createBankOf(owner);
  const { body } = await owner.send('post', `/api/banks/${bankId}/checks`, checkInput());
  const decision = { action: 'sendBack', version: 1, question: 'Which shunt was it?' };
  const { status } = await moderator.send('post', `/api/screening/${body.id}/decision`, decision);
  expect(status).toBe(200);
  // The notice is written once the decision can't be undone any more.
  minutes += 1;
  server.setNow(new Date(Date.UTC(2026, 11, 1, 12, minutes)).toISOString());
  await server.deps.jobs.settle();
  return OutboxMail.findOne({ where: { recipient: owner.email! }, order: [['rowid', 'DESC']] });
}

const addressIn = (mail: OutboxMail | null) => {
  const url = new URL(mail!.headers!['List-Unsubscribe']!.slice(1, -1));
  return url.pathname + url.search;
};
const choice = async () => (await owner.get('/api/account/notices')).body;

describe('what is sent', () => {
  it('is by default questions, decisions and reminders, and no news', async () => {
    expect(await choice()).toEqual({ reminders: true, decisions: true, releases: false });
    expect((await ask())?.text).toContain('Which shunt was it?');
  });

  it('leaves out what the owner does not want, and the decision stands all the same', async () => {
    const wish = { reminders: true, decisions: false, releases: true };
    const { status, body } = await owner.send('put', '/api/account/notices', wish);
    expect([status, body]).toEqual([200, wish]);
    expect(await choice()).toEqual(wish);
    expect(await ask()).toBeNull();
  });

  it('keeps what an account needs, whatever was chosen', async () => {
    await User.update({ noticeReminders: false, noticeDecisions: false }, { where: { id: owner.userId! } });
    const visitor = await server.client();
    await visitor.send('post', '/api/account/request-reset', { email: owner.email });
    const mail = await OutboxMail.findOne({ where: { recipient: owner.email! } });
    expect(mail).toMatchObject({ subject: 'Choose a new password', headers: null });
  });

  it('is chosen by the account alone, whole', async () => {
    const visitor = await server.client();
    expect((await visitor.get('/api/account/notices')).status).toBe(401);
    expect((await visitor.send('put', '/api/account/notices', {})).status).toBe(401);
    const { status, body } = await owner.send('put', '/api/account/notices', { reminders: 'yes' });
    expect([status, Object.keys(body.error.fields).sort()]).toEqual([
      422,
      ['decisions', 'releases', 'reminders'],
    ]);
  });
});

describe('stopping it from the mail', () => {
  it('works by one POST of a mail program: no cookie, no token of a page, a form as its body', async () => {
    const { status, body } = await supertest(server.app)
      .post(addressIn(await ask()))
      .type('form')
      .send('List-Unsubscribe=One-Click');
    expect([status, body]).toEqual([200, { kind: 'decisions' }]);
    expect(await choice()).toEqual({ reminders: true, decisions: false, releases: false });
  });

  it('takes a body in parts as well, and a second press', async () => {
    const address = addressIn(await ask());
    for (let press = 0; press < 2; press += 1) {
      const { status } = await supertest(server.app).post(address).field('List-Unsubscribe', 'One-Click');
      expect(status).toBe(200);
    }
    expect((await choice()).decisions).toBe(false);
  });

  it('does nothing on a GET but lead to the page that asks', async () => {
    const address = addressIn(await ask());
    const { status, headers } = await supertest(server.app).get(address);
    expect([status, headers.location]).toEqual([303, `http://localhost:8080${address.replace('/api', '')}`]);
    expect((await choice()).decisions).toBe(true);
  });

  it('stops it for the account of the mail and no other', async () => {
    const address = addressIn(await ask());
    const other = await server.client('owner');
    await other.send('post', address);
    expect((await other.get('/api/account/notices')).body.decisions).toBe(true);
    expect((await choice()).decisions).toBe(false);
  });

  it('refuses an address that was altered, cut or is none', async () => {
    const address = addressIn(await ask());
    const post = (path: string) => supertest(server.app).post(path);
    expect((await post(address.slice(0, -4) + 'AAAA')).status).toBe(404);
    expect((await post(address.slice(0, -4))).status).toBe(404);
    expect((await post('/api/unsubscribe')).status).toBe(422);
    expect((await choice()).decisions).toBe(true);
  });

  it('is offered in the headers of the mail as it leaves', async () => {
    const mail = await ask();
    const handedOver: { headers?: unknown }[] = [];
    jest.spyOn(nodemailer, 'createTransport').mockReturnValueOnce({
      sendMail: async (message: object) => handedOver.push(message),
    } as unknown as ReturnType<typeof nodemailer.createTransport>);
    await mail!.update({ state: 'queued' });
    await sendQueuedMail(server.deps)();
    expect(handedOver).toContainEqual(expect.objectContaining({ headers: mail!.headers }));
  });
});
