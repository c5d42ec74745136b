import type { Migration } from '../migrate';

/**
 * Claims, decisions that can be undone for a while, proposals that wait for a second opinion, corrections, real failures
 * and merged duplicates; and the curves of logs, to be compared with new ones.
 */
const statements = [
  `ALTER TABLE checks ADD COLUMN correction JSON`,
  `ALTER TABLE checks ADD COLUMN isRealFailure INTEGER NOT NULL DEFAULT 0 CHECK (isRealFailure IN (0,1))`,
  `ALTER TABLE checks ADD COLUMN mergedIntoId TEXT REFERENCES checks(id)`,
  `CREATE TABLE claims (
    checkId TEXT PRIMARY KEY REFERENCES checks(id) ON DELETE CASCADE,
    moderatorId TEXT NOT NULL REFERENCES users(id) ON DELETE CASCADE,
    expiresAt DATETIME NOT NULL
  )`,
  `CREATE TABLE decisions (
    id TEXT PRIMARY KEY,
    checkId TEXT NOT NULL REFERENCES checks(id),
    moderatorId TEXT NOT NULL REFERENCES users(id),
    action TEXT NOT NULL CHECK (action IN ('approve','correct','realFailure','sendBack','turnAway','recall','merge')),
    words TEXT NOT NULL,
    version INTEGER NOT NULL,
    before JSON NOT NULL,
    decidedAt DATETIME NOT NULL,
    takesEffectAt DATETIME NOT NULL,
    undoneAt DATETIME,
    UNIQUE (checkId, version)
  )`,
  `CREATE TABLE proposals (
    checkId TEXT PRIMARY KEY REFERENCES checks(id) ON DELETE CASCADE,
    moderatorId TEXT NOT NULL REFERENCES users(id) ON DELETE CASCADE,
    reason TEXT NOT NULL,
    version INTEGER NOT NULL,
    proposedAt DATETIME NOT NULL
  )`,
  `CREATE TABLE logCurves (
    uploadId TEXT PRIMARY KEY REFERENCES uploads(id) ON DELETE CASCADE,
    durationS REAL NOT NULL,
    curve JSON NOT NULL
  )`,
  `CREATE INDEX logCurvesByDuration ON logCurves(durationS)`,
  `CREATE INDEX findingsByRule ON findings(rule, checkId) WHERE severity > 0`,
  `CREATE INDEX checksBySubmission ON checks(submittedAt)`,
];

export const moderation: Migration = {
  name: '0004-moderation',
  up: async ({ context }) => {
    for (const statement of statements) await context.sequelize.query(statement);
  },
};
