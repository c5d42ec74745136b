import type { MakeRelease } from '@/lib/contract/releases';

import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { previewRelease } from './previewRelease';

/**
 * Queues the next release. Refused while one is being made, and where nothing may be published that is not already.
 * @throws AppError conflict
 */
export async function requestRelease(deps: Deps, actor: SignedInActor, { note }: MakeRelease): Promise<void> {
  const { isMaking, changes } = await previewRelease(deps);
  if (isMaking) throw new AppError('conflict', 'A release is being made already.');
  if (changes.came + changes.left + changes.changed === 0)
    throw new AppError('conflict', 'There is nothing to release that is not public already.');
  await deps.db.transaction((transaction) =>
    deps.jobs.enqueue(
      { kind: 'makeRelease', payload: { note, userId: actor.userId }, dedupeKey: 'makeRelease' },
      transaction,
    ),
  );
}
