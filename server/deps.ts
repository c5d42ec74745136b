import type { Logger } from 'pino';
import type { Sequelize } from 'sequelize';

import type { Config } from './config';
import type { JobRunner } from './jobs/JobRunner';

/** What the parts of the server are handed at start; tests hand their own. */
export interface Deps {
  config: Config;
  db: Sequelize;
  logger: Logger;
  jobs: JobRunner;
  /** Now, injectable. */
  clock: () => Date;
}
