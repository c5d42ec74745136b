import type { Migration } from '../migrate';

/** Releases with their files, and which bank stands in each under which name. None of it is ever changed. */
const tables = ['releases', 'releaseFiles', 'releaseBanks'] as const;
const statements = [
  `CREATE TABLE releases (
    number INTEGER PRIMARY KEY AUTOINCREMENT,
    publishedOn TEXT NOT NULL CHECK (length(publishedOn) = 10),
    note TEXT NOT NULL,
    codeVersion TEXT NOT NULL,
    owners INTEGER NOT NULL CHECK (owners >= 5),
    banks INTEGER NOT NULL,
    checks INTEGER NOT NULL,
    dataSha256 TEXT NOT NULL CHECK (length(dataSha256) = 64),
    figures JSON NOT NULL,
    changes JSON NOT NULL,
    createdAt DATETIME NOT NULL
  )`,
  `CREATE TABLE releaseFiles (
    number INTEGER NOT NULL REFERENCES releases(number),
    name TEXT NOT NULL,
    storageKey TEXT NOT NULL UNIQUE,
    type TEXT NOT NULL,
    bytes INTEGER NOT NULL CHECK (bytes > 0),
    sha256 TEXT NOT NULL CHECK (length(sha256) = 64),
    PRIMARY KEY (number, name)
  )`,
  `CREATE TABLE releaseBanks (
    number INTEGER NOT NULL REFERENCES releases(number),
    pseudonym TEXT NOT NULL CHECK (length(pseudonym) = 5),
    bankId TEXT NOT NULL,
    ownerId TEXT NOT NULL,
    identity JSON NOT NULL,
    level INTEGER NOT NULL CHECK (level BETWEEN 0 AND 6),
    rows JSON NOT NULL,
    PRIMARY KEY (number, pseudonym)
  )`,
  ...tables.flatMap((table) => [
    `CREATE TRIGGER ${table}NoUpdate BEFORE UPDATE ON ${table} BEGIN SELECT RAISE(ABORT, 'a release is immutable'); END`,
    `CREATE TRIGGER ${table}NoDelete BEFORE DELETE ON ${table} BEGIN SELECT RAISE(ABORT, 'a release is immutable'); END`,
  ]),
];

export const releases: Migration = {
  name: '0017-releases',
  up: async ({ context }) => {
    for (const statement of statements) await context.sequelize.query(statement);
  },
};
