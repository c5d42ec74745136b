import type { Transaction } from 'sequelize';

import { Check, Upload } from '../db/models';
import { AppError } from '../errors';
import { type Action, type Actor, authorizeRecord } from '../policies';

/**
 * The log, if the actor may do this with it.
 * @throws AppError notFound, for others' uploads too
 */
export async function findOwnUpload(
  actor: Actor,
  action: Action,
  uploadId: string,
  transaction?: Transaction,
): Promise<Upload> {
  const upload = await Upload.findOne({ where: { id: uploadId, kind: 'log' }, transaction });
  if (!upload) throw new AppError('notFound');
  authorizeRecord(actor, action, upload);
  return upload;
}

/** An upload that is a photo: with a small twin and a size. */
export type Photo = Upload & { thumbKey: string; width: number; height: number };

/**
 * The photo, if the actor may do this with it. Others than its owner see only what a check was sent in with.
 * @throws AppError notFound, for others' photos too
 */
export async function findPhoto(
  actor: Actor,
  action: Extract<Action, `photos.${string}`>,
  photoId: string,
  transaction?: Transaction,
): Promise<Photo> {
  const photo = await Upload.findOne({ where: { id: photoId, kind: 'photo' }, transaction });
  if (!photo) throw new AppError('notFound');
  authorizeRecord(actor, action, photo);
  const isOwn = actor.role !== 'visitor' && actor.userId === photo.ownerId;
  if (!isOwn && (await Check.count({ where: { photoId }, transaction })) === 0)
    throw new AppError('notFound');
  return photo as Photo;
}
