import { type ChildProcess, spawn } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { once } from 'node:events';
import { resolve } from 'node:path';
import { createInterface } from 'node:readline';

import type { Role } from '@/lib/contract/accounts';
import { type Config, readConfig } from '@/server/config';
import { accessCookie, signAccessToken } from '@/server/http/actor';

/** The server in a process of its own, so that it can be killed. */
export interface ServerProcess {
  url: string;
  /** SIGKILL: nothing is tidied up. */
  kill: () => Promise<void>;
}

const environmentOf = (dataDir: string): NodeJS.ProcessEnv => ({
  NODE_ENV: 'test',
  PATH: process.env.PATH,
  EBBLINE_DATA_DIR: dataDir,
  EBBLINE_BCRYPT_COST: '4',
  EBBLINE_RATE_LIMITS: 'off',
  EBBLINE_LOG_LEVEL: 'info',
  HOST: '127.0.0.1',
  PORT: '0',
});

/** The settings such a process runs with. */
export const processConfig = (dataDir: string): Config => readConfig(environmentOf(dataDir));

/** Starts server/index.ts on a data folder, with further settings if need be, and waits until it listens. */
export async function startServerProcess(
  dataDir: string,
  settings: Record<string, string> = {},
): Promise<ServerProcess> {
  const root = resolve(__dirname, '../..');
  const child: ChildProcess = spawn(process.execPath, ['--import', 'tsx', 'server/index.ts'], {
    cwd: root,
    env: { ...environmentOf(dataDir), ...settings },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  const lines = createInterface({ input: child.stdout! });
  for await (const line of lines) {
    const url = /listening on (http:\/\/[\d.:]+)/.exec(line)?.[1];
    if (!url) continue;
    child.stdout!.resume();
    return {
      url,
      async kill() {
        if (child.exitCode !== null || child.signalCode !== null) return;
        child.kill('SIGKILL');
        await once(child, 'exit');
      },
    };
  }
  throw new Error('the server ended before it listened');
}

/** Headers of a signed-in client of such a process; without a user, of a visitor. */
export async function signedInHeaders(
  { url }: ServerProcess,
  config: Config,
  user?: { userId: string; role: Role },
): Promise<Record<string, string>> {
  const access = user
    ? `${accessCookie}=${signAccessToken(config, { ...user, familyId: randomUUID() })}`
    : '';
  const session = await fetch(`${url}/api/account/session`, {
    headers: { cookie: access, connection: 'close' },
  });
  const { csrfToken } = (await session.json()) as { csrfToken: string };
  const csrfCookie = session.headers.getSetCookie().map((cookie) => cookie.split(';')[0]);
  return { cookie: [access, ...csrfCookie].join('; '), 'x-csrf-token': csrfToken };
}
