import { execFile } from 'node:child_process';

import type { Health } from '@/lib/contract/steward';
import packageJson from '@/package.json';

let revision: Promise<string | null> | undefined;

/** Of the working copy it runs from, where that is one; asked for once. */
function readRevision(): Promise<string | null> {
  revision ??= new Promise((resolve) =>
    execFile('git', ['describe', '--always', '--dirty', '--tags'], { timeout: 5_000 }, (error, stdout) =>
      resolve(error ? null : stdout.trim() || null),
    ),
  );
  return revision;
}

/** Which program runs, and since when. */
export async function readProgram(now: Date): Promise<Health['program']> {
  const startedAt = new Date(now.getTime() - process.uptime() * 1000);
  return {
    version: packageJson.version,
    revision: await readRevision(),
    startedAt: startedAt.toISOString(),
  };
}
