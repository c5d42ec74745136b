import type { Migration } from '../migrate';

/** Photos of the meter: uploads with a small twin, a hash of how they look, and the check they belong to. */
const statements = [
  `ALTER TABLE uploads ADD COLUMN thumbKey TEXT`,
  `ALTER TABLE uploads ADD COLUMN width INTEGER CHECK (width > 0)`,
  `ALTER TABLE uploads ADD COLUMN height INTEGER CHECK (height > 0)`,
  `ALTER TABLE uploads ADD COLUMN perceptualHash TEXT CHECK (length(perceptualHash) = 16)`,
  `CREATE INDEX uploadsByLook ON uploads(perceptualHash) WHERE perceptualHash IS NOT NULL`,
  `ALTER TABLE checks ADD COLUMN photoId TEXT REFERENCES uploads(id)`,
  `CREATE INDEX checksByPhoto ON checks(photoId) WHERE photoId IS NOT NULL`,
];

export const photos: Migration = {
  name: '0002-photos',
  up: async ({ context }) => {
    for (const statement of statements) await context.sequelize.query(statement);
  },
};
