import { literal, Op } from 'sequelize';

import { Upload } from '../db/models';
import type { Deps } from '../deps';
import type { JobHandler } from '../jobs/JobRunner';
import { keysOf } from './keysOf';

/** A draft may wait for weeks; a file no check was sent in with for longer is of no use to anybody. */
export const abandonedAfterDays = 60;

const dayMs = 24 * 3600 * 1000;

/**
 * Job: removes logs and photos that were sent in and never came to belong to a check. Rows first: a file without one is
 * swept at the next start.
 */
export function sweepAbandoned({ clock, db, storage }: Pick<Deps, 'clock' | 'db' | 'storage'>): JobHandler {
  return async () => {
    const before = new Date(clock().getTime() - abandonedAfterDays * dayMs);
    const keys = await db.transaction(async (transaction) => {
      const abandoned = await Upload.findAll({
        where: {
          updatedAt: { [Op.lt]: before },
          [Op.and]: literal(
            'NOT EXISTS (SELECT 1 FROM checks WHERE checks.uploadId = Upload.id OR checks.photoId = Upload.id)',
          ),
        },
        attributes: ['id', 'storageKey', 'thumbKey', 'parts'],
        transaction,
      });
      await Upload.destroy({ where: { id: abandoned.map(({ id }) => id) }, transaction });
      return abandoned.flatMap(keysOf);
    });
    for (const key of keys) await storage.remove(key);
  };
}
