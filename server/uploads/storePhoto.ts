import { rm } from 'node:fs/promises';

import { findOwnBank } from '../banks/queries';
import { Upload } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { hashOf } from './hashOf';
import { preparePhoto } from './preparePhoto';

/** Cameras write dates and places into names as well; nobody is ever shown one. */
const filename = 'photo.webp';

/**
 * Keeps a photo that has arrived, in the form it is shown in; what was sent is not kept, but its hash. Files first,
 * then their row, so that a row always has its files.
 * @returns the photo's id
 * @throws AppError invalid (no file, empty, damaged), unsupportedType, tooLarge
 */
export async function storePhoto(
  { storage, db }: Deps,
  actor: SignedInActor,
  bankId: string,
  file: Express.Multer.File | undefined,
): Promise<string> {
  if (!file) throw new AppError('invalid', undefined, { file: 'Choose a picture.' });
  const keys: string[] = [];
  const write = async (content: Buffer) => {
    const key = await storage.write(content);
    keys.push(key);
    return key;
  };
  try {
    const { full, thumb, width, height, perceptualHash } = await preparePhoto(file.path);
    const sha256 = await hashOf(file.path);
    const [storageKey, thumbKey] = [await write(full), await write(thumb)];
    return await db.transaction(async (transaction) => {
      const { ownerId } = await findOwnBank(actor, 'photos.create', bankId, transaction);
      const kept = { storageKey, thumbKey, width, height, perceptualHash, sha256, bytes: file.size };
      const { id } = await Upload.create(
        { ownerId, bankId, kind: 'photo', filename, state: 'ready', progressFraction: 1, ...kept },
        { transaction },
      );
      return id;
    });
  } catch (error) {
    for (const key of keys) await storage.remove(key);
    throw error;
  } finally {
    await rm(file.path, { force: true });
  }
}
