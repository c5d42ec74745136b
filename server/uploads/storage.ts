import { randomBytes } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { mkdir, open, readdir, rename, rm } from 'node:fs/promises';
import { join } from 'node:path';
import type { Readable } from 'node:stream';

/** Where uploaded files are kept. Keys are random and say nothing of the file. */
export interface FileStorage {
  /** Folder that files arrive in before they are saved. */
  incomingDir: string;
  /** Takes over a file that has arrived, whole or not at all; returns its key. */
  save: (incomingPath: string) => Promise<string>;
  open: (key: string, options?: { end?: number }) => Readable;
  remove: (key: string) => Promise<void>;
  keys: () => Promise<string[]>;
  /** Removes what arrived and was never saved. */
  clearIncoming: () => Promise<void>;
}

const keyPattern = /^[0-9a-f]{32}$/;
const readBytes = 256 * 1024;

/** Files in a local folder. The incoming folder lies inside it, so that saving is a rename. */
export function createLocalStorage(folder: string): FileStorage {
  const incomingDir = join(folder, 'tmp');
  const filesDir = join(folder, 'files');
  const pathOf = (key: string) => {
    if (!keyPattern.test(key)) throw new RangeError('storage requires a key it has given out');
    return join(filesDir, key);
  };
  return {
    incomingDir,
    async save(incomingPath) {
      const key = randomBytes(16).toString('hex');
      await mkdir(filesDir, { recursive: true });
      await flushToDisk(incomingPath);
      await rename(incomingPath, pathOf(key));
      await flushToDisk(filesDir);
      return key;
    },
    open: (key, { end } = {}) => createReadStream(pathOf(key), { highWaterMark: readBytes, end }),
    remove: (key) => rm(pathOf(key), { force: true }),
    keys: async () => (await namesIn(filesDir)).filter((name) => keyPattern.test(name)),
    async clearIncoming() {
      for (const name of await namesIn(incomingDir)) await rm(join(incomingDir, name), { force: true });
    },
  };
}

/** An upload that was acknowledged must outlive a power cut. */
async function flushToDisk(path: string): Promise<void> {
  const handle = await open(path, 'r');
  await handle.sync().finally(() => handle.close());
}

async function namesIn(folder: string): Promise<string[]> {
  await mkdir(folder, { recursive: true });
  return readdir(folder);
}
