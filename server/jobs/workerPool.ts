import { Piscina } from 'piscina';
import type { Logger } from 'pino';

/**
 * A pool of worker threads running one TypeScript file's default export, so that heavy work leaves the API responsive.
 * A thread that dies fails its task and is replaced; it does not take the server with it.
 * @param file absolute path of the worker module
 */
export function createWorkerPool(file: string, logger: Logger, maxThreads = 1): Piscina {
  const pool = new Piscina({
    filename: file,
    execArgv: ['--import', 'tsx'],
    minThreads: 0,
    maxThreads,
    idleTimeout: 30_000,
  });
  pool.on('error', (error: unknown) => logger.error({ err: error }, 'a worker thread failed'));
  return pool;
}
