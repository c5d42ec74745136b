import { useEffect, useRef } from 'react';

import { useClaim, useRelease } from '@/lib/client/moderation';
import type { Submission } from '@/lib/contract/moderation';

/** Well within the quarter of an hour that a claim lasts. */
const renewMs = 5 * 60_000;

/** Claims a check that waits while it is on the screen, and gives it back when it is left. */
export function useKeptClaim({ checkId, state, isOwn, claim }: Submission): void {
  const { mutate: take } = useClaim(checkId);
  const { mutate: release } = useRelease(checkId);
  const isWanted = state === 'submitted' && !isOwn && claim?.by !== 'other';
  const isDecided = useRef(state !== 'submitted');
  useEffect(() => {
    isDecided.current = state !== 'submitted';
  });
  useEffect(() => {
    if (!isWanted) return;
    take();
    const timer = setInterval(() => take(), renewMs);
    return () => {
      clearInterval(timer);
      // A decision has ended the claim by itself.
      if (!isDecided.current) release();
    };
  }, [isWanted, take, release]);
}
