import { once } from 'node:events';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';

import { pino } from 'pino';

import { createApp } from './app';
import type { Config } from './config';
import { connect } from './db/connect';
import { migrate } from './db/migrate';
import type { Deps } from './deps';
import { refitIfOlder } from './fits/refitIfOlder';
import { JobRunner } from './jobs/JobRunner';
import { registerJobs } from './registerJobs';
import { scheduleDailyTick } from './reminders/dailyTick';
import { createStorage } from './uploads/createStorage';
import { sweepStaleUploads } from './uploads/sweepStaleUploads';

export interface RunningServer {
  url: string;
  deps: Deps;
  stop: () => Promise<void>;
}

/** Opens the database, migrates, starts the jobs and listens. Stops in the reverse order. */
export async function start(config: Config, options: { clock?: () => Date } = {}): Promise<RunningServer> {
  const logger = pino({ level: config.logLevel });
  const clock = options.clock ?? (() => new Date());
  const db = await connect(config.databaseFile);
  await migrate(db);
  const jobs = new JobRunner(db, logger, clock);
  const storage = createStorage(config);
  const deps: Deps = { config, db, logger, jobs, storage, clock };
  await sweepStaleUploads(deps);
  const closeWorkers = registerJobs(deps);
  const server: Server = createApp(deps).listen(config.port, config.host);
  await once(server, 'listening');
  await refitIfOlder(deps);
  await jobs.start();
  await scheduleDailyTick(deps);
  const { port } = server.address() as AddressInfo;
  return {
    url: `http://${config.host}:${port}`,
    deps,
    async stop() {
      server.closeIdleConnections();
      await new Promise((resolve) => server.close(resolve));
      await jobs.stop();
      await closeWorkers();
      storage.close();
      await db.close();
    },
  };
}
