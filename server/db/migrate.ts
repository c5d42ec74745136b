import type { QueryInterface, Sequelize } from 'sequelize';
import { type RunnableMigration, SequelizeStorage, Umzug } from 'umzug';

import { foundation } from './migrations/0001-foundation';
import { photos } from './migrations/0002-photos';
import { ownData } from './migrations/0003-own-data';
import { moderation } from './migrations/0004-moderation';
import { proposedNames } from './migrations/0010-proposed-names';
import { logParts } from './migrations/0011-log-parts';
import { healthRecords } from './migrations/0012-health-records';
import { steward } from './migrations/0014-steward';
import { catalogue } from './migrations/0015-catalogue';
import { publicIdentity } from './migrations/0016-public-identity';
import { releases } from './migrations/0017-releases';
import { checksFromFiles } from './migrations/0018-checks-from-files';

export type Migration = RunnableMigration<QueryInterface>;

const migrations: Migration[] = [
  foundation,
  photos,
  ownData,
  moderation,
  proposedNames,
  logParts,
  healthRecords,
  steward,
  catalogue,
  publicIdentity,
  releases,
  checksFromFiles,
];

export const knownMigrations: readonly string[] = migrations.map(({ name }) => name);

/** Brings the schema up to date; returns the names of the migrations that ran. */
export async function migrate(sequelize: Sequelize): Promise<string[]> {
  const umzug = new Umzug({
    migrations,
    context: sequelize.getQueryInterface(),
    storage: new SequelizeStorage({ sequelize, tableName: 'migrations' }),
    logger: undefined,
  });
  return (await umzug.up()).map(({ name }) => name);
}
