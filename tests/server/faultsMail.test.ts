import { mkdtempSync, rmSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import type { Sequelize } from 'sequelize';
import { SMTPServer } from 'smtp-server';

import { connect } from '@/server/db/connect';
import { migrate } from '@/server/db/migrate';
import { OutboxMail, User } from '@/server/db/models';

import {
  processConfig,
  type ServerProcess,
  signedInHeaders,
  startServerProcess,
} from '../support/serverProcess';

jest.setTimeout(120_000);

const dataDir = mkdtempSync(join(tmpdir(), 'ebbline-mail-'));
const config = processConfig(dataDir);
const email = 'newcomer@example.org';
const received: string[] = [];
let isSilent = true;
let mailbox: SMTPServer;
let db: Sequelize;
let server: ServerProcess;

beforeAll(async () => {
  mailbox = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    onData(stream, _session, done) {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        received.push(Buffer.concat(chunks).toString('utf8'));
        // A mailbox that took the mail and has not said so yet.
        if (!isSilent) done();
      });
    },
  });
  // Its clients are killed.
  mailbox.on('error', () => undefined);
  await new Promise<void>((resolve) => mailbox.listen(0, '127.0.0.1', resolve));
  db = await connect(config.databaseFile);
  await migrate(db);
  server = await start();
});
afterAll(async () => {
  await server.kill();
  await new Promise<void>((resolve) => mailbox.close(resolve));
  await db.close();
  rmSync(dataDir, { recursive: true, force: true });
});

function start(): Promise<ServerProcess> {
  const { port } = mailbox.server.address() as AddressInfo;
  return startServerProcess(dataDir, { EBBLINE_SMTP_URL: `smtp://127.0.0.1:${port}` });
}

async function post(path: string, body: object): Promise<Response> {
  const headers = { ...(await signedInHeaders(server, config)), 'content-type': 'application/json' };
  return fetch(server.url + path, { method: 'POST', headers, body: JSON.stringify(body) });
}

async function until(isTrue: () => Promise<boolean> | boolean): Promise<void> {
  while (!(await isTrue())) await new Promise((resolve) => setTimeout(resolve, 10));
}

const header = (raw: string, name: string) => new RegExp(`^${name}: (.*)$`, 'mi').exec(raw)?.[1]?.trim();

it('sends the mail of an acknowledged registration again after a kill in the middle of handing it over', async () => {
  const answer = await post('/api/account/register', { email, password: 'tide table in the hall' });
  expect(answer.ok).toBe(true);
  await until(() => received.length === 1);
  await server.kill();
  expect(await OutboxMail.findAll()).toEqual([
    expect.objectContaining({ recipient: email, state: 'queued' }),
  ]);
  isSilent = false;
  server = await start();
  await until(async () => (await OutboxMail.count({ where: { state: 'sent' } })) === 1);
  expect(received).toHaveLength(2);
  // The same mail to whoever gets both.
  expect(header(received[1]!, 'Message-ID')).toBe(header(received[0]!, 'Message-ID'));
  expect(header(received[0]!, 'Message-ID')).toBeDefined();
});

it('takes the link of that mail', async () => {
  const token = /token=3D([\w-]+)|token=([\w-]+)/.exec(received[1]!.replaceAll('=\r\n', ''));
  const answer = await post('/api/account/verify', { token: token?.[1] ?? token?.[2] });
  expect(answer.ok).toBe(true);
  const user = await User.findOne({ where: { email }, rejectOnEmpty: true });
  expect(user.emailVerifiedAt).not.toBeNull();
});

it('sends nothing twice at a further restart', async () => {
  await server.kill();
  server = await start();
  const answer = await post('/api/account/register', {
    email: 'second@example.org',
    password: 'ebb at seven fifty',
  });
  expect(answer.ok).toBe(true);
  await until(async () => (await OutboxMail.count({ where: { state: 'sent' } })) === 2);
  expect(received).toHaveLength(3);
});
