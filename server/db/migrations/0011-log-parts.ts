import type { Migration } from '../migrate';

/** Logs that a recorder split into several files, and columns that their owner matched by hand. */
const statements = [
  `ALTER TABLE uploads ADD COLUMN parts JSON`,
  `ALTER TABLE uploads ADD COLUMN isMatched TINYINT(1) NOT NULL DEFAULT 0`,
  `CREATE INDEX uploadsMatched ON uploads(ownerId, createdAt) WHERE isMatched = 1`,
];

export const logParts: Migration = {
  name: '0011-log-parts',
  up: async ({ context }) => {
    for (const statement of statements) await context.sequelize.query(statement);
  },
};
