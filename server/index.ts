import { readConfig } from './config';
import { start } from './start';

/** Starts the server and stops it in order on a signal. */
async function main(): Promise<void> {
  const running = await start(readConfig());
  running.deps.logger.info(`listening on ${running.url}`);
  for (const signal of ['SIGINT', 'SIGTERM'] as const)
    process.once(signal, () => void running.stop().then(() => process.exit(0)));
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? error.message : error);
  process.exit(1);
});
