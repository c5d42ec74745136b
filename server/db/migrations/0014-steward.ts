import type { Migration } from '../migrate';

/** The second step of signing in, locked accounts, what became of mails, and what checks of the trail found. */
const statements = [
  `ALTER TABLE users ADD COLUMN lockedAt DATETIME`,
  `CREATE INDEX usersByRole ON users(role, email)`,
  `CREATE TABLE secondFactors (
    userId TEXT PRIMARY KEY REFERENCES users(id) ON DELETE CASCADE,
    sealedSecret TEXT NOT NULL,
    confirmedAt DATETIME,
    lastStep INTEGER,
    failures INTEGER NOT NULL DEFAULT 0,
    closedUntil DATETIME,
    createdAt DATETIME NOT NULL
  )`,
  `CREATE TABLE recoveryCodes (
    userId TEXT NOT NULL REFERENCES users(id) ON DELETE CASCADE,
    codeHash TEXT NOT NULL CHECK (length(codeHash) = 64),
    usedAt DATETIME,
    PRIMARY KEY (userId, codeHash)
  )`,
  `ALTER TABLE outbox ADD COLUMN problem TEXT`,
  `CREATE INDEX outboxByState ON outbox(state, createdAt)`,
  `CREATE INDEX jobsByState ON jobs(state, updatedAt)`,
  `CREATE INDEX trailByRecord ON trail(subjectId, id)`,
  `CREATE INDEX trailByTime ON trail(at, id)`,
  `CREATE INDEX checksByDecision ON checks(decidedAt) WHERE decidedAt IS NOT NULL`,
  `CREATE TABLE trailChecks (
    id INTEGER PRIMARY KEY AUTOINCREMENT,
    entries INTEGER NOT NULL,
    lastHash TEXT NOT NULL,
    problems JSON NOT NULL,
    durationMs REAL NOT NULL,
    checkedAt DATETIME NOT NULL
  )`,
];

export const steward: Migration = {
  name: '0014-steward',
  up: async ({ context }) => {
    for (const statement of statements) await context.sequelize.query(statement);
  },
};
