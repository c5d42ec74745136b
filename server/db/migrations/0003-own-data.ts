import type { Migration } from '../migrate';

/** Notices and reminders by choice, changed addresses, erased accounts, and consent to the data licence. */
const statements = [
  `ALTER TABLE users ADD COLUMN noticeReminders INTEGER NOT NULL DEFAULT 1 CHECK (noticeReminders IN (0,1))`,
  `ALTER TABLE users ADD COLUMN noticeDecisions INTEGER NOT NULL DEFAULT 1 CHECK (noticeDecisions IN (0,1))`,
  `ALTER TABLE users ADD COLUMN noticeReleases INTEGER NOT NULL DEFAULT 0 CHECK (noticeReleases IN (0,1))`,
  `ALTER TABLE users ADD COLUMN erasedAt DATETIME`,
  `CREATE TABLE addressChanges (
    id TEXT PRIMARY KEY,
    userId TEXT NOT NULL REFERENCES users(id) ON DELETE CASCADE,
    email TEXT NOT NULL CHECK (email = lower(email)),
    tokenHash TEXT NOT NULL UNIQUE,
    expiresAt DATETIME NOT NULL,
    createdAt DATETIME NOT NULL
  )`,
  `CREATE INDEX addressChangesByUser ON addressChanges(userId)`,
  `CREATE TABLE reminders (
    bankId TEXT PRIMARY KEY REFERENCES banks(id) ON DELETE CASCADE,
    isOn INTEGER NOT NULL CHECK (isOn IN (0,1)),
    dueOn TEXT CHECK (length(dueOn) = 10),
    setAfter TEXT CHECK (length(setAfter) = 10),
    createdAt DATETIME NOT NULL,
    updatedAt DATETIME NOT NULL
  )`,
  `ALTER TABLE outbox ADD COLUMN headers JSON`,
  `ALTER TABLE outbox ADD COLUMN userId TEXT REFERENCES users(id)`,
  `CREATE INDEX outboxByUser ON outbox(userId)`,
  `CREATE TABLE trailTexts (
    trailId INTEGER NOT NULL REFERENCES trail(id),
    field TEXT NOT NULL,
    salt TEXT NOT NULL,
    text TEXT NOT NULL,
    PRIMARY KEY (trailId, field)
  )`,
  `ALTER TABLE checks ADD COLUMN consentVersion INTEGER`,
];

export const ownData: Migration = {
  name: '0003-own-data',
  up: async ({ context }) => {
    for (const statement of statements) await context.sequelize.query(statement);
  },
};
