import { open, rm } from 'node:fs/promises';

import { decodeSniff } from '@/lib/measure';

import { findOwnBank } from '../banks/queries';
import { Upload } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { Actor } from '../policies';
import { cleanFilename } from './cleanFilename';
import { hashOf } from './hashOf';

/** Enough to tell text from other things, and its encoding. */
const sniffBytes = 64 * 1024;

/**
 * Keeps a log that has arrived: file first, then its row and the job that reads it in one transaction, so that a row
 * always has its file.
 * @returns the upload's id
 * @throws AppError invalid (no file, empty), unsupportedType (not text)
 */
export async function storeLog(
  deps: Deps,
  actor: Extract<Actor, { userId: string }>,
  bankId: string,
  file: Express.Multer.File | undefined,
): Promise<string> {
  if (!file) throw new AppError('invalid', undefined, { file: 'Choose a file.' });
  try {
    await refuseUnlessText(file.path);
    return await keep(deps, actor, bankId, file);
  } finally {
    await rm(file.path, { force: true });
  }
}

async function keep(
  { storage, db, jobs }: Deps,
  actor: Extract<Actor, { userId: string }>,
  bankId: string,
  { path, originalname, size: bytes }: Express.Multer.File,
): Promise<string> {
  const sha256 = await hashOf(path);
  const storageKey = await storage.save(path);
  try {
    return await db.transaction(async (transaction) => {
      const { ownerId } = await findOwnBank(actor, 'uploads.create', bankId, transaction);
      const filename = cleanFilename(originalname);
      const upload = await Upload.create(
        { ownerId, bankId, kind: 'log', filename, storageKey, sha256, bytes, state: 'received' },
        { transaction },
      );
      await jobs.enqueue({ kind: 'integrateLog', payload: { uploadId: upload.id } }, transaction);
      return upload.id;
    });
  } catch (error) {
    await storage.remove(storageKey);
    throw error;
  }
}

async function refuseUnlessText(path: string): Promise<void> {
  const handle = await open(path, 'r');
  const { buffer, bytesRead } = await handle
    .read({ buffer: Buffer.alloc(sniffBytes), length: sniffBytes })
    .finally(() => handle.close());
  const sniffed = decodeSniff(buffer.subarray(0, bytesRead));
  if (sniffed.ok) return;
  const code = sniffed.reason === 'binary' ? 'unsupportedType' : 'invalid';
  throw new AppError(code, sniffed.message, { file: sniffed.message });
}
