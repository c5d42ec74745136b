import { demoAccounts } from '@/server/accounts/demoAccounts';
import { readConfig } from '@/server/config';
import { seedDemo } from '@/server/seed/seedDemo';
import { type RunningServer, start } from '@/server/start';

import { buildWeb } from './buildWeb';

/** `npm start`: build what changed, migrate, seed the demo into an empty database, serve app and API. */
async function main(): Promise<void> {
  const config = readConfig();
  await buildWeb();
  const running = await start(config);
  if (config.isDemo && (await seedDemo(running.deps))) console.log('The demo scenario is in place.');
  announce(running);
  for (const signal of ['SIGINT', 'SIGTERM'] as const)
    process.once(signal, () => void running.stop().then(() => process.exit(0)));
}

function announce({ url, deps }: RunningServer): void {
  console.log(`\nEbbline is at ${url}\n`);
  if (!deps.config.isDemo) return;
  console.log('Demo accounts:');
  for (const { email, password, note } of demoAccounts)
    console.log(`  ${email.padEnd(26)} ${password}  ${note}`);
  console.log(`Mails of the demo are at ${url}/outbox\n`);
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
