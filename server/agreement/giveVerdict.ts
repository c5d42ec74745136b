import type { BlindOutcome, Verdict } from '@/lib/contract/agreement';

import type { Deps } from '../deps';
import { AppError } from '../errors';
import type { SignedInActor } from '../policies';
import { appendTrail } from '../trail/appendTrail';
import { findReview } from './queries';

/**
 * Keeps a second moderator's verdict beside the first, which it does not change; both are told from then on.
 * @throws AppError notFound (another's, or own bank), conflict (given already)
 */
export async function giveVerdict(
  deps: Deps,
  actor: SignedInActor,
  reviewId: string,
  { verdict, words }: { verdict: Verdict; words: string },
): Promise<BlindOutcome> {
  return deps.db.transaction(async (transaction) => {
    const review = await findReview(actor, reviewId, transaction);
    if (review.doneAt) throw new AppError('conflict', 'You have given your verdict on this one.');
    const at = deps.clock();
    await review.update({ verdict, words, doneAt: at }, { transaction });
    const entry = { actor, at, subjectType: 'check', subjectId: review.checkId } as const;
    await appendTrail(
      { ...entry, action: 'lookedAtBlind', details: { verdict, reason: words } },
      transaction,
    );
    return { first: firstVerdict(review.decision.action), second: verdict, words: review.decision.words };
  });
}

/** Only first judgements are drawn, and each of them is a verdict. */
export const firstVerdict = (action: string): Verdict => action as Verdict;
