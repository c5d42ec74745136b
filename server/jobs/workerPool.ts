import { Piscina } from 'piscina';

/**
 * A pool of worker threads running one TypeScript file's default export, so that heavy work leaves the API responsive.
 * @param file absolute path of the worker module
 */
export function createWorkerPool(file: string, maxThreads = 1): Piscina {
  return new Piscina({
    filename: file,
    execArgv: ['--import', 'tsx'],
    minThreads: 0,
    maxThreads,
    idleTimeout: 30_000,
  });
}
