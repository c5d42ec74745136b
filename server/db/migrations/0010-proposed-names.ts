import type { Migration } from '../migrate';

/**
 * Proposers must not learn of each other, yet maker and name are unique: where another's proposal has a name already, the
 * row's own name is told apart, and what was typed stands here.
 */
export const proposedNames: Migration = {
  name: '0010-proposed-names',
  up: async ({ context }) => {
    await context.sequelize.query('ALTER TABLE cellTypes ADD COLUMN proposedName TEXT');
  },
};
