import type { Migration } from '../migrate';

/** Which file of earlier checks a check came in with; those that stand already say it in the trail. */
const statements = [
  `ALTER TABLE checks ADD COLUMN fileDigest VARCHAR(64)`,
  `UPDATE checks SET fileDigest = (
     SELECT json_extract(trail.details, '$.fromFile.digest') FROM trail
     WHERE trail.subjectType = 'check' AND trail.subjectId = checks.id AND trail.action = 'submitted'
   )`,
];

export const checksFromFiles: Migration = {
  name: '0018-checks-from-files',
  up: async ({ context }) => {
    for (const statement of statements) await context.sequelize.query(statement);
  },
};
