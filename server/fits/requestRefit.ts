import type { Transaction } from 'sequelize';

import type { Deps } from '../deps';

/** Asks for a refit in the caller's transaction; requests that still wait are one. */
export async function requestRefit({ jobs }: Deps, transaction: Transaction): Promise<void> {
  await jobs.enqueue({ kind: 'refit', dedupeKey: 'refit' }, transaction);
}
