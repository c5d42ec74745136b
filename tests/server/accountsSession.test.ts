import { startTestServer, type TestServer } from '../support/testServer';

let server: TestServer;
beforeAll(async () => (server = await startTestServer()));
afterAll(() => server.stop());

it('tells a visitor that nobody is signed in', async () => {
  const visitor = await server.client();
  const { status, body } = await visitor.get('/api/account/session');
  expect(status).toBe(200);
  expect(body).toMatchObject({ user: null, isDemo: true, canRefresh: false });
});

it('tells an owner who they are, and nothing more', async () => {
  const owner = await server.client('owner');
  const { body } = await owner.get('/api/account/session');
  expect(body.user).toEqual({ id: owner.userId, email: owner.email, role: 'owner' });
});
