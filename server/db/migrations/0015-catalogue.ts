import type { Migration } from '../migrate';

/**
 * A version of each cell type, and what became of those that are no longer in the catalogue: they keep the state
 * 'proposed', so that nothing that asks for listed ones finds them. Decisions drawn for a second, blind look.
 */
const statements = [
  `ALTER TABLE cellTypes ADD COLUMN version INTEGER NOT NULL DEFAULT 1`,
  `ALTER TABLE cellTypes ADD COLUMN closedAs TEXT CHECK (closedAs IN ('declined','merged'))`,
  `ALTER TABLE cellTypes ADD COLUMN closedAt DATETIME`,
  `ALTER TABLE cellTypes ADD COLUMN mergedIntoId TEXT REFERENCES cellTypes(id)`,
  `CREATE TABLE blindReviews (
    id TEXT PRIMARY KEY,
    checkId TEXT NOT NULL UNIQUE REFERENCES checks(id) ON DELETE CASCADE,
    decisionId TEXT NOT NULL REFERENCES decisions(id),
    reviewerId TEXT REFERENCES users(id),
    drawnAt DATETIME NOT NULL,
    verdict TEXT CHECK (verdict IN ('approve','correct','realFailure','sendBack','turnAway')),
    words TEXT NOT NULL DEFAULT '',
    doneAt DATETIME
  )`,
  `CREATE INDEX blindReviewsByReviewer ON blindReviews(reviewerId, doneAt)`,
];

export const catalogue: Migration = {
  name: '0015-catalogue',
  up: async ({ context }) => {
    for (const statement of statements) await context.sequelize.query(statement);
  },
};
