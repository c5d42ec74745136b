import type { Migration } from '../migrate';

/**
 * Members of the public pool carry the fields by which their bank could be found, and how far these are generalised.
 * Members of before had neither: they come anew with the next step.
 */
const statements = [
  `ALTER TABLE publicMembers ADD COLUMN identity JSON`,
  `ALTER TABLE publicMembers ADD COLUMN level INTEGER NOT NULL DEFAULT 0 CHECK (level BETWEEN 0 AND 6)`,
  `DELETE FROM publicMembers`,
];

export const publicIdentity: Migration = {
  name: '0016-public-identity',
  up: async ({ context }) => {
    for (const statement of statements) await context.sequelize.query(statement);
  },
};
