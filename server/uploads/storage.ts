import { randomBytes } from 'node:crypto';
import type { Readable } from 'node:stream';

/** Where uploaded files are kept. Keys are random and say nothing of the file. */
export interface FileStorage {
  /** Local folder that files arrive in before they are saved. */
  incomingDir: string;
  /** Takes over a file that has arrived, whole or not at all; returns its key. `key`: one given out before, to restore. */
  save: (incomingPath: string, key?: string) => Promise<string>;
  /** Keeps what is in memory, whole or not at all; returns its key. */
  write: (content: Uint8Array) => Promise<string>;
  /** `start` and `end`: the first and the last byte wanted. */
  open: (key: string, options?: { start?: number; end?: number }) => Promise<Readable>;
  /** Nothing happens where there is nothing. */
  remove: (key: string) => Promise<void>;
  keys: () => Promise<string[]>;
  /** Removes what arrived and was never saved. */
  clearIncoming: () => Promise<void>;
  close: () => void;
}

/** A bucket of an S3-compatible store; the credentials are found by the client in its usual environment. */
export interface BucketSettings {
  /** Undefined: the one that belongs to the region. */
  endpoint: string | undefined;
  bucket: string;
  region: string;
}

/** Plain data, so that a worker thread can be told where the files are. */
export interface StorageSettings {
  uploadsDir: string;
  /** Undefined: files stay in the folder. */
  bucket: BucketSettings | undefined;
}

/** The store could not be reached or did not do as asked; nothing of it is the sender's fault. */
export class StorageError extends Error {
  constructor(cause: unknown) {
    super('the store of files does not answer as it should', { cause });
    this.name = 'StorageError';
  }
}

const keyPattern = /^[0-9a-f]{32}$/;

export const newKey = () => randomBytes(16).toString('hex');
export const isKey = (name: string) => keyPattern.test(name);

/** @throws RangeError for a key that was never given out, such as a path */
export function assertKey(key: string): void {
  if (!isKey(key)) throw new RangeError('storage requires a key it has given out');
}

/** A whole file in memory; for small ones. */
export async function readWhole(storage: FileStorage, key: string): Promise<Buffer> {
  const pieces: Buffer[] = [];
  for await (const piece of (await storage.open(key)) as AsyncIterable<Buffer>) pieces.push(piece);
  return Buffer.concat(pieces);
}
