import { once } from 'node:events';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';

import { z } from 'zod';

import type * as Http from '@/lib/client/http';
import type * as SessionTokens from '@/lib/client/sessionTokens';
import { sessionSchema } from '@/lib/contract/accounts';
import { bankListSchema, bankSchema } from '@/lib/contract/banks';
import { Session } from '@/server/db/models';

import { createAccount, goodPassword } from '../support/accounts';
import { bankInput, createCellType } from '../support/bankFixtures';
import { startTestServer, type TestServer } from '../support/testServer';

// The app's own request code against the real server: fetch gets the cookie jar that a browser has.
const jar = new Map<string, string>();
const sent: string[] = [];
let server: TestServer;
let listener: Server;
let http: typeof Http;
let tokens: typeof SessionTokens;
const bareFetch = global.fetch;

async function browserFetch(url: string | URL | Request, init: RequestInit = {}): Promise<Response> {
  sent.push(`${init.method ?? 'GET'} ${new URL(String(url)).pathname}`);
  const headers = new Headers(init.headers);
  headers.set('cookie', [...jar].map(([name, value]) => `${name}=${value}`).join('; '));
  const response = await bareFetch(url, { ...init, headers });
  for (const line of response.headers.getSetCookie()) {
    const [, name = '', value = ''] = /^([^=]+)=([^;]*)/.exec(line) ?? [];
    if (value) jar.set(name, value);
    else jar.delete(name);
  }
  return response;
}

const signIn = async (email: string) =>
  tokens.keepSession(
    await http.apiRequest(sessionSchema, '/api/account/sign-in', {
      method: 'POST',
      body: { email, password: goodPassword },
    }),
  );

beforeAll(async () => {
  server = await startTestServer();
  await createCellType();
  listener = server.app.listen(0, '127.0.0.1');
  await once(listener, 'listening');
  process.env.EXPO_PUBLIC_API_ORIGIN = `http://127.0.0.1:${(listener.address() as AddressInfo).port}`;
  global.fetch = browserFetch;
  http = await import('@/lib/client/http');
  tokens = await import('@/lib/client/sessionTokens');
  await createAccount(server, 'client@example.org');
});

afterAll(async () => {
  global.fetch = bareFetch;
  delete process.env.EXPO_PUBLIC_API_ORIGIN;
  listener.closeAllConnections();
  await new Promise((resolve) => listener.close(resolve));
  await server.stop();
});

beforeEach(async () => {
  jar.clear();
  await tokens.readSession();
  sent.length = 0;
});

it('signs in, reads and writes', async () => {
  await signIn('client@example.org');
  const bank = await http.apiRequest(bankSchema, '/api/banks', { method: 'POST', body: bankInput() });
  const { banks } = await http.apiRequest(bankListSchema, '/api/banks');
  expect(banks.map(({ id }) => id)).toContain(bank.id);
});

it('renews an access token that has run out once for all who ask, and tries again', async () => {
  await signIn('client@example.org');
  jar.delete('ebblineAccess');
  sent.length = 0;
  await Promise.all([1, 2, 3].map(() => http.apiRequest(bankListSchema, '/api/banks')));
  expect(sent.filter((call) => call === 'POST /api/account/refresh')).toHaveLength(1);
  expect(sent.filter((call) => call === 'GET /api/banks')).toHaveLength(6);
});

it('renews before a change too, whose CSRF token was of the old access token', async () => {
  await signIn('client@example.org');
  jar.delete('ebblineAccess');
  const bank = await http.apiRequest(bankSchema, '/api/banks', { method: 'POST', body: bankInput() });
  expect(bank.name).toBe('Barn');
});

it("goes on with another tab's token when that one has signed in anew", async () => {
  await signIn('client@example.org');
  const old = jar.get('ebblineCsrf');
  jar.delete('ebblineCsrf');
  await bareFetch(`${process.env.EXPO_PUBLIC_API_ORIGIN}/api/account/session`, {
    headers: { cookie: [...jar].map(([name, value]) => `${name}=${value}`).join('; ') },
  }).then((response) => jar.set('ebblineCsrf', /=([^;]+)/.exec(response.headers.getSetCookie()[0]!)![1]!));
  expect(jar.get('ebblineCsrf')).not.toBe(old);
  const bank = await http.apiRequest(bankSchema, '/api/banks', { method: 'POST', body: bankInput() });
  expect(bank.name).toBe('Barn');
});

it('leaves a visitor when the sign-in was ended elsewhere, and says so to the request', async () => {
  await signIn('client@example.org');
  await Session.update({ revokedAt: server.deps.clock() }, { where: {} });
  jar.delete('ebblineAccess');
  const failure = await http.apiRequest(bankListSchema, '/api/banks').catch((error: unknown) => error);
  expect(failure).toMatchObject({ code: 'notSignedIn', status: 401 });
  expect(http.isSessionLost(failure)).toBe(true);
  expect((await tokens.readSession()).user).toBeNull();
  expect(jar.has('ebblineRefresh')).toBe(false);
});

it('asks a visitor to sign in without trying twice', async () => {
  const failure = await http.apiRequest(bankListSchema, '/api/banks').catch((error: unknown) => error);
  expect(failure).toMatchObject({ code: 'notSignedIn' });
  expect(sent.filter((call) => call === 'GET /api/banks')).toHaveLength(1);
});

it("gives the server's messages by field", async () => {
  await signIn('client@example.org');
  const failure = await http
    .apiRequest(bankSchema, '/api/banks', { method: 'POST', body: { ...bankInput(), series: 900 } })
    .catch((error: unknown) => error);
  expect(failure).toMatchObject({ code: 'invalid', status: 422, fields: { series: expect.any(String) } });
});

it('tells a missing connection, an unknown answer and an abort apart', async () => {
  global.fetch = () => Promise.reject(new TypeError('Failed to fetch'));
  const offline = await http.apiRequest(bankListSchema, '/api/banks').catch((error: unknown) => error);
  expect(offline).toMatchObject({ code: 'offline', status: 0 });
  global.fetch = async () => new Response('<html>Bad gateway</html>', { status: 502 });
  const proxy = await http.apiRequest(bankListSchema, '/api/banks').catch((error: unknown) => error);
  expect(proxy).toMatchObject({ code: 'unavailable', status: 502 });
  global.fetch = browserFetch;
  const other = await http
    .apiRequest(z.object({ nothingLikeIt: z.string() }), '/api/account/session')
    .catch((error: unknown) => error);
  expect(other).toMatchObject({ code: 'unreadable' });
  const aborted = await http
    .apiRequest(sessionSchema, '/api/account/session', { signal: AbortSignal.abort() })
    .catch((error: unknown) => error);
  expect(aborted).toMatchObject({ name: 'AbortError' });
});
