import { Check } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { findPhoto } from './queries';

/**
 * Removes a photo that no check was sent in with. The row goes first: a file without one is swept at the next start.
 * @throws AppError notFound, conflict (a check shows it)
 */
export async function removePhoto(
  { storage, db }: Deps,
  actor: SignedInActor,
  photoId: string,
): Promise<void> {
  const { storageKey, thumbKey } = await db.transaction(async (transaction) => {
    const photo = await findPhoto(actor, 'photos.remove', photoId, transaction);
    if ((await Check.count({ where: { photoId }, transaction })) > 0)
      throw new AppError('conflict', 'A check was sent in with this photo.');
    await photo.destroy({ transaction });
    return photo;
  });
  for (const key of [storageKey, thumbKey]) await storage.remove(key);
}
