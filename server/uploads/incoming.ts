import { mkdir, readdir, rm } from 'node:fs/promises';
import { join } from 'node:path';

/** Where files arrive in before they are saved, whatever keeps them afterwards. */
export const incomingDirOf = (uploadsDir: string) => join(uploadsDir, 'tmp');

export async function clearIncoming(incomingDir: string): Promise<void> {
  for (const name of await namesIn(incomingDir)) await rm(join(incomingDir, name), { force: true });
}

export async function namesIn(folder: string): Promise<string[]> {
  await mkdir(folder, { recursive: true });
  return readdir(folder);
}
