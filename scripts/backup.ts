// Saves database and uploaded files into one archive while the server runs: npm run -s backup [-- FILE]. Without FILE it
// lies in the data folder's backups/, named by the instant.
import { existsSync } from 'node:fs';
import { mkdir, stat, writeFile } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';

import { makeBackup } from '../server/backup/makeBackup';
import { readConfig } from '../server/config';
import { connect } from '../server/db/connect';
import { backupStamp } from '../server/steward/readStorage';
import { createStorage } from '../server/uploads/createStorage';

async function main(): Promise<void> {
  const config = readConfig();
  if (!existsSync(config.databaseFile)) throw new Error(`There is no database at ${config.databaseFile}.`);
  const clock = () => new Date();
  const name = `ebbline-${clock().toISOString().slice(0, 19).replace(/:/g, '-')}.tar.gz`;
  const file = resolve(process.argv[2] ?? join(config.backupsDir, name));
  const db = await connect(config.databaseFile);
  const storage = createStorage(config);
  try {
    const { files, database, createdAt } = await makeBackup({ db, storage, clock }, file);
    // What the steward's page shows as the last backup, wherever the archive itself lies.
    const stamp = join(config.dataDir, backupStamp);
    await mkdir(dirname(stamp), { recursive: true });
    await writeFile(stamp, JSON.stringify({ at: createdAt, bytes: (await stat(file)).size }));
    console.log(`Saved to ${file}`);
    console.log(`  database ${(database.bytes / 1e6).toFixed(1)} MB, uploaded files ${files.length}`);
  } finally {
    storage.close();
    await db.close();
  }
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exitCode = 1;
});
