import type { Logger } from 'pino';
import type { Sequelize } from 'sequelize';

import type { Config } from './config';
import type { JobRunner } from './jobs/JobRunner';
import type { FileStorage } from './uploads/storage';

/** What the parts of the server are handed at start; tests hand their own. */
export interface Deps {
  config: Config;
  db: Sequelize;
  logger: Logger;
  jobs: JobRunner;
  storage: FileStorage;
  /** Now, injectable. */
  clock: () => Date;
}
