import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { randomUUID } from 'node:crypto';

import type { Express } from 'express';
import { pino } from 'pino';
import supertest from 'supertest';

import type { Role } from '@/lib/contract/accounts';
import { createApp } from '@/server/app';
import { type Config, readConfig } from '@/server/config';
import { connect } from '@/server/db/connect';
import { migrate } from '@/server/db/migrate';
import { User } from '@/server/db/models';
import type { Deps } from '@/server/deps';
import { accessCookie, signAccessToken } from '@/server/http/actor';
import { JobRunner } from '@/server/jobs/JobRunner';
import { registerJobs } from '@/server/registerJobs';
import { createStorage } from '@/server/uploads/createStorage';

export interface TestServer {
  app: Express;
  deps: Deps;
  /** Moves the server's clock. */
  setNow: (instant: string) => void;
  /** A client that keeps cookies and carries the CSRF token; without a role it is a visitor. */
  client: (role?: Role) => Promise<TestClient>;
  stop: () => Promise<void>;
}

export interface TestClient {
  userId: string | undefined;
  email: string | undefined;
  get: (path: string) => supertest.Test;
  send: (method: 'post' | 'put' | 'delete', path: string, body?: object) => supertest.Test;
}

/** The real application on a temporary SQLite file. Jobs run when `deps.jobs.settle()` is awaited. */
export async function startTestServer(settings: Partial<Config> = {}): Promise<TestServer> {
  const dataDir = mkdtempSync(join(tmpdir(), 'ebbline-test-'));
  const config = {
    ...readConfig({
      NODE_ENV: 'test',
      EBBLINE_BCRYPT_COST: '4',
      EBBLINE_DATA_DIR: dataDir,
      EBBLINE_RATE_LIMITS: 'off',
    }),
    ...settings,
  };
  let now = new Date('2026-12-01T12:00:00Z');
  const clock = () => now;
  const logger = pino({ level: 'silent' });
  const db = await connect(config.databaseFile);
  await migrate(db);
  const jobs = new JobRunner(db, logger, clock);
  const storage = createStorage(config);
  const deps: Deps = { config, db, logger, jobs, storage, clock };
  const closeWorkers = registerJobs(deps);
  const app = createApp(deps);

  return {
    app,
    deps,
    setNow: (instant) => (now = new Date(instant)),
    client: (role) => createClient(app, config, role),
    async stop() {
      await jobs.stop();
      await closeWorkers();
      storage.close();
      await db.close();
      rmSync(dataDir, { recursive: true, force: true });
    },
  };
}

async function createClient(app: Express, config: Config, role?: Role): Promise<TestClient> {
  const user = role && (await createUser(role));
  const agent = supertest.agent(app);
  const cookies: string[] = [];
  if (user) {
    const token = signAccessToken(config, { role: user.role, userId: user.id, familyId: randomUUID() });
    cookies.push(`${accessCookie}=${token}`);
  }
  const session = await agent.get('/api/account/session').set('Cookie', cookies);
  const csrfCookie = [session.headers['set-cookie'] ?? []].flat().map((cookie) => cookie.split(';')[0]!);
  const allCookies = [...cookies, ...csrfCookie];
  return {
    userId: user?.id,
    email: user?.email,
    get: (path) => supertest(app).get(path).set('Cookie', allCookies),
    send: (method, path, body) =>
      supertest(app)
        [method](path)
        .set('Cookie', allCookies)
        .set('x-csrf-token', session.body.csrfToken ?? '')
        .send(body),
  };
}

let userCount = 0;

async function createUser(role: Role): Promise<User> {
  userCount += 1;
  return User.create({
    email: `${role}${userCount}@example.org`,
    passwordHash: 'not-a-hash',
    role,
    emailVerifiedAt: new Date(),
  });
}
