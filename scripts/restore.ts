// Puts a backup in place: npm run -s restore -- FILE [--replace]. Refuses a damaged or newer one, and a place that is
// taken unless told to move what is there aside. The server must not run.
import { resolve } from 'node:path';
import { parseArgs } from 'node:util';

import { restoreBackup } from '../server/backup/restoreBackup';
import { readConfig } from '../server/config';
import { createStorage } from '../server/uploads/createStorage';

const usage = 'usage: npm run -s restore -- FILE [--replace]';

async function main(): Promise<void> {
  const { positionals, values } = parseArgs({
    allowPositionals: true,
    options: { replace: { type: 'boolean' } },
  });
  const [file] = positionals;
  if (positionals.length !== 1 || file === undefined) throw new Error(usage);
  const config = readConfig();
  const storage = createStorage(config);
  try {
    const { manifest, movedTo } = await restoreBackup(resolve(file), config, storage, {
      isReplacing: values.replace,
      clock: () => new Date(),
    });
    console.log(`Restored to ${config.dataDir}: the state of ${manifest.createdAt}.`);
    if (movedTo) console.log(`What was there lies in ${movedTo}.`);
  } finally {
    storage.close();
  }
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
});
