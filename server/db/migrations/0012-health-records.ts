import type { Migration } from '../migrate';

/** Health records as issued: what one says never changes; withdrawn ones may be emptied. */
const statements = [
  `CREATE TABLE healthRecords (
    id TEXT PRIMARY KEY,
    bankId TEXT NOT NULL REFERENCES banks(id),
    tokenHash TEXT NOT NULL UNIQUE CHECK (length(tokenHash) = 64),
    content TEXT CHECK (content IS NOT NULL OR revokedAt IS NOT NULL),
    digest TEXT NOT NULL CHECK (length(digest) = 64),
    issuedAt DATETIME NOT NULL,
    revokedAt DATETIME
  )`,
  `CREATE INDEX healthRecordsByBank ON healthRecords(bankId, issuedAt)`,
  `CREATE TRIGGER healthRecordsAsIssued BEFORE UPDATE ON healthRecords
    WHEN NEW.id IS NOT OLD.id OR NEW.bankId IS NOT OLD.bankId OR NEW.tokenHash IS NOT OLD.tokenHash
      OR NEW.digest IS NOT OLD.digest OR NEW.issuedAt IS NOT OLD.issuedAt
      OR (OLD.revokedAt IS NOT NULL AND NEW.revokedAt IS NOT OLD.revokedAt)
      OR (NEW.content IS NOT OLD.content AND NEW.content IS NOT NULL)
    BEGIN SELECT RAISE(ABORT, 'a health record stays as issued'); END`,
  `CREATE TRIGGER healthRecordsNoDelete BEFORE DELETE ON healthRecords
    BEGIN SELECT RAISE(ABORT, 'a health record is withdrawn, not deleted'); END`,
];

export const healthRecords: Migration = {
  name: '0012-health-records',
  up: async ({ context }) => {
    for (const statement of statements) await context.sequelize.query(statement);
  },
};
