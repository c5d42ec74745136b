import { createReadStream } from 'node:fs';
import { mkdir, open, rename, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';

import { clearIncoming, incomingDirOf, namesIn } from './incoming';
import { assertKey, type FileStorage, isKey, newKey } from './storage';

const readBytes = 256 * 1024;

/** Files in a local folder. The incoming folder lies inside it, so that saving is a rename. */
export function createFolderStorage(folder: string): FileStorage {
  const incomingDir = incomingDirOf(folder);
  const filesDir = join(folder, 'files');
  const pathOf = (key: string) => {
    assertKey(key);
    return join(filesDir, key);
  };
  const save = async (incomingPath: string, key = newKey()) => {
    await mkdir(filesDir, { recursive: true });
    await flushToDisk(incomingPath);
    await rename(incomingPath, pathOf(key));
    await flushToDisk(filesDir);
    return key;
  };
  return {
    incomingDir,
    save,
    async write(content) {
      await mkdir(incomingDir, { recursive: true });
      const path = join(incomingDir, newKey());
      await writeFile(path, content, { flag: 'wx' });
      return save(path);
    },
    open: async (key, range = {}) => createReadStream(pathOf(key), { highWaterMark: readBytes, ...range }),
    remove: async (key) => rm(pathOf(key), { force: true }),
    keys: async () => (await namesIn(filesDir)).filter(isKey),
    clearIncoming: () => clearIncoming(incomingDir),
    close: () => undefined,
  };
}

/** An upload that was acknowledged must outlive a power cut. */
async function flushToDisk(path: string): Promise<void> {
  const handle = await open(path, 'r');
  await handle.sync().finally(() => handle.close());
}
