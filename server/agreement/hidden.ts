import { BlindReview } from '../db/models';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';

/** Checks whose decision the reader must not learn yet: they look at them blind. */
export async function findHidden({ userId }: SignedInActor): Promise<Set<string>> {
  const reviews = await BlindReview.findAll({
    attributes: ['checkId'],
    where: { reviewerId: userId, doneAt: null },
  });
  return new Set(reviews.map(({ checkId }) => checkId));
}

/** @throws AppError conflict for a check that the reader is to look at blind first */
export async function refuseIfHidden(actor: SignedInActor, checkId: string): Promise<void> {
  if (!(await findHidden(actor)).has(checkId)) return;
  throw new AppError(
    'conflict',
    'You are asked for a second look at this one without knowing what was decided. It is under Agreement.',
  );
}
