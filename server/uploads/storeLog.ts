import { open, rm } from 'node:fs/promises';

import { decodeSniff } from '@/lib/measure';

import { findOwnBank } from '../banks/queries';
import { type LogPart, Upload } from '../db/models';
import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { Actor } from '../policies';
import { cleanFilename } from './cleanFilename';
import { hashOf } from './hashOf';

/** Enough to tell text from other things, and its encoding. */
const sniffBytes = 64 * 1024;

/**
 * Keeps a log that has arrived, in one file or in the several its recorder split it into: files first, then the row and
 * the job that reads it in one transaction, so that a row always has its files.
 * @returns the upload's id
 * @throws AppError invalid (no file, empty), unsupportedType (not text)
 */
export async function storeLog(
  deps: Deps,
  actor: Extract<Actor, { userId: string }>,
  bankId: string,
  files: readonly Express.Multer.File[],
): Promise<string> {
  const [first, ...others] = files;
  if (!first) throw new AppError('invalid', undefined, { file: 'Choose a file.' });
  try {
    for (const file of files) await refuseUnlessText(file, others.length > 0);
    return await keep(deps, actor, bankId, [first, ...others]);
  } finally {
    for (const { path } of files) await rm(path, { force: true });
  }
}

async function keep(
  { storage, db, jobs }: Deps,
  actor: Extract<Actor, { userId: string }>,
  bankId: string,
  [first, ...others]: [Express.Multer.File, ...Express.Multer.File[]],
): Promise<string> {
  const saved: string[] = [];
  const save = async ({ path, originalname, size: bytes }: Express.Multer.File): Promise<LogPart> => {
    const sha256 = await hashOf(path);
    const storageKey = await storage.save(path);
    saved.push(storageKey);
    return { filename: cleanFilename(originalname), storageKey, sha256, bytes };
  };
  try {
    const kept = await save(first);
    const parts: LogPart[] = [];
    for (const other of others) parts.push(await save(other));
    return await db.transaction(async (transaction) => {
      const { ownerId } = await findOwnBank(actor, 'uploads.create', bankId, transaction);
      const upload = await Upload.create(
        { ...kept, parts: parts.length > 0 ? parts : null, ownerId, bankId, kind: 'log', state: 'received' },
        { transaction },
      );
      await jobs.enqueue({ kind: 'integrateLog', payload: { uploadId: upload.id } }, transaction);
      return upload.id;
    });
  } catch (error) {
    for (const key of saved) await storage.remove(key);
    throw error;
  }
}

async function refuseUnlessText(
  { path, originalname }: Express.Multer.File,
  isOneOfSeveral: boolean,
): Promise<void> {
  const handle = await open(path, 'r');
  const { buffer, bytesRead } = await handle
    .read({ buffer: Buffer.alloc(sniffBytes), length: sniffBytes })
    .finally(() => handle.close());
  const sniffed = decodeSniff(buffer.subarray(0, bytesRead));
  if (sniffed.ok) return;
  const code = sniffed.reason === 'binary' ? 'unsupportedType' : 'invalid';
  const message = isOneOfSeveral ? `${cleanFilename(originalname)}: ${sniffed.message}` : sniffed.message;
  throw new AppError(code, message, { file: message });
}
