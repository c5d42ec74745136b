// Checks the append-only trail of a database: npm run -s trail -- verify [--database FILE]. Every entry must hold the
// hash of its own content and of the entry before it, and every text kept beside an entry the digest in it. Ends with 0
// when the chain is whole, 1 with what is wrong when it is not, 2 when it can't be read.
import { existsSync } from 'node:fs';
import { parseArgs } from 'node:util';

import { readConfig } from '../server/config';
import { connect } from '../server/db/connect';
import { verifyTrail } from '../server/trail/verifyTrail';

const usage = 'usage: npm run -s trail -- verify [--database FILE]';

async function main(): Promise<number> {
  const { positionals, values } = parseArgs({
    allowPositionals: true,
    options: { database: { type: 'string' } },
  });
  if (positionals.length !== 1 || positionals[0] !== 'verify') throw new Error(usage);
  const file = values.database ?? readConfig().databaseFile;
  if (!existsSync(file)) throw new Error(`There is no database at ${file}.`);
  const db = await connect(file);
  try {
    const { entries, lastHash, problems } = await verifyTrail();
    for (const { id, problem } of problems) console.log(`entry ${id}: ${problem}`);
    const seal = lastHash === '' ? '' : `, sealed by ${lastHash}`;
    console.log(
      problems.length === 0
        ? `The trail is whole: ${entries} entries${seal}.`
        : `The trail is NOT whole: ${problems.length} of ${entries} entries are wrong.`,
    );
    return problems.length === 0 ? 0 : 1;
  } finally {
    await db.close();
  }
}

main().then(
  (code) => (process.exitCode = code),
  (error: unknown) => {
    console.error(error instanceof Error ? error.message : error);
    process.exitCode = 2;
  },
);
