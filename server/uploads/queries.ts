import type { Transaction } from 'sequelize';

import { Upload } from '../db/models';
import { AppError } from '../errors';
import { type Action, type Actor, authorizeRecord } from '../policies';

/**
 * The upload, if the actor may do this with it.
 * @throws AppError notFound, for others' uploads too
 */
export async function findOwnUpload(
  actor: Actor,
  action: Action,
  uploadId: string,
  transaction?: Transaction,
): Promise<Upload> {
  const upload = await Upload.findByPk(uploadId, { transaction });
  if (!upload) throw new AppError('notFound');
  authorizeRecord(actor, action, upload);
  return upload;
}
