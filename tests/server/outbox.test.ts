import { demoAccounts } from '@/server/accounts/demoAccounts';

import { createAccount } from '../support/accounts';
import { openBrowser } from '../support/browser';
import { startTestServer, type TestServer } from '../support/testServer';

const demoOnly = ['/api/outbox', '/api/account/demo-accounts'];

describe('in demo mode', () => {
  let server: TestServer;
  beforeAll(async () => (server = await startTestServer()));
  afterAll(() => server.stop());

  it('shows every mail, the newest first, with what the link needs', async () => {
    const browser = await openBrowser(server.app);
    await createAccount(server, 'first@example.org');
    await browser.post('/api/account/request-reset', { email: 'first@example.org' });
    await server.deps.jobs.settle();
    await browser.post('/api/account/register', {
      email: 'second@example.org',
      password: 'tide table in the hall',
    });
    const { status, body } = await browser.get('/api/outbox');
    expect(status).toBe(200);
    expect(body.messages.map(({ to, state }: { to: string; state: string }) => [to, state])).toEqual([
      ['second@example.org', 'queued'],
      ['first@example.org', 'sent'],
    ]);
    expect(body.messages[1].text).toMatch(/http:\/\/localhost:8080\/reset\?token=[\w-]{43}/);
  });

  it('lists the demo accounts', async () => {
    const { body } = await (await server.client()).get('/api/account/demo-accounts');
    expect(body.accounts).toEqual(demoAccounts);
  });
});

describe.each([
  ['in production', { isProduction: true, isDemo: false }],
  ['when mail leaves by SMTP', { smtpUrl: 'smtp://localhost:2525' }],
])('%s', (_name, settings) => {
  let server: TestServer;
  beforeAll(async () => (server = await startTestServer(settings)));
  afterAll(() => server.stop());

  it('shows no mail to anybody', async () => {
    for (const role of [undefined, 'owner', 'moderator', 'steward'] as const) {
      const { status, body } = await (await server.client(role)).get('/api/outbox');
      expect([status, body.error.code]).toEqual([404, 'notFound']);
    }
  });
});

it('shows no demo accounts in production', async () => {
  const server = await startTestServer({ isProduction: true, isDemo: false });
  const visitor = await server.client();
  for (const path of demoOnly) expect((await visitor.get(path)).status).toBe(404);
  expect((await visitor.get('/api/account/session')).body.isDemo).toBe(false);
  await server.stop();
});
