import type { AddressInfo } from 'node:net';

import { SMTPServer } from 'smtp-server';

import { OutboxMail } from '@/server/db/models';
import { queueMail } from '@/server/mail/queueMail';

import { startTestServer, type TestServer } from '../support/testServer';

interface Received {
  to: string[];
  raw: string;
}

let mailbox: SMTPServer;
let received: Received[];
let isRefusing: boolean;
let server: TestServer;

beforeEach(async () => {
  received = [];
  isRefusing = false;
  mailbox = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    onData(stream, { envelope }, done) {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => chunks.push(chunk));
      stream.on('end', () => {
        if (isRefusing) return done(new Error('try again later'));
        const raw = Buffer.concat(chunks).toString('utf8');
        received.push({ to: envelope.rcptTo.map(({ address }) => address), raw });
        done();
      });
    },
  });
  await new Promise<void>((resolve) => mailbox.listen(0, '127.0.0.1', resolve));
  const { port } = mailbox.server.address() as AddressInfo;
  server = await startTestServer({ smtpUrl: `smtp://127.0.0.1:${port}` });
});
afterEach(async () => {
  await server.stop();
  await new Promise<void>((resolve) => mailbox.close(resolve));
});

const queue = (onceKey?: string) =>
  server.deps.db.transaction((transaction) =>
    queueMail(
      server.deps,
      { to: 'owner@example.org', subject: 'A question', text: 'How warm was it?', onceKey },
      transaction,
    ),
  );

it('hands a queued mail over by SMTP and remembers that it is sent', async () => {
  await queue();
  await server.deps.jobs.settle();
  expect(received).toHaveLength(1);
  expect(received[0]!.to).toEqual(['owner@example.org']);
  expect(received[0]!.raw).toContain('Subject: A question');
  expect(received[0]!.raw).toContain('How warm was it?');
  expect(await OutboxMail.findOne()).toMatchObject({ state: 'sent', sentAt: server.deps.clock() });
});

it('writes mails of one key once, however often they are asked for', async () => {
  await queue('decision:1');
  await queue('decision:1');
  await server.deps.jobs.settle();
  expect(received).toHaveLength(1);
});

it('keeps a mail that is refused and sends it once when the mailbox takes it again', async () => {
  isRefusing = true;
  await queue();
  await server.deps.jobs.settle();
  expect(await OutboxMail.findOne()).toMatchObject({ state: 'queued' });
  isRefusing = false;
  server.setNow('2026-12-01T13:00:00Z');
  await server.deps.jobs.settle();
  expect(received).toHaveLength(1);
});
