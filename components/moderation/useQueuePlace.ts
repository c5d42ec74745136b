import { useInfiniteQuery } from '@tanstack/react-query';
import { useRouter } from 'expo-router';

import { queueQuery } from '@/lib/client/moderation';
import type { QueueEntry } from '@/lib/contract/moderation';

import { useQueueFilters, writeFilters } from './queueFilters';

interface QueuePlace {
  toNext: () => void;
  toPrevious: () => void;
  /** After a decision: on to the next one that is free, or back to the queue when there is none. */
  goOn: () => void;
}

/** The place of a check in the queue as it is filtered, and the ways from there. */
export function useQueuePlace(currentId: string): QueuePlace {
  const filters = useQueueFilters();
  const router = useRouter();
  const { data } = useInfiniteQuery(queueQuery(filters));
  const entries = data?.pages.flatMap((page) => page.entries) ?? [];
  const params = writeFilters(filters);
  const open = (entry: QueueEntry | undefined) => {
    if (entry)
      router.navigate({ pathname: '/screening/[checkId]', params: { ...params, checkId: entry.checkId } });
  };
  const place = entries.findIndex(({ checkId }) => checkId === currentId);
  return {
    toNext: () => open(entries[place + 1]),
    toPrevious: () => open(entries[place - 1]),
    goOn() {
      const next = nextFree(entries, currentId);
      if (next) open(next);
      else router.navigate({ pathname: '/screening', params });
    },
  };
}

/** The first that this moderator may decide on, after the current one and then from the top. */
export function nextFree(entries: readonly QueueEntry[], currentId: string): QueueEntry | undefined {
  const place = entries.findIndex(({ checkId }) => checkId === currentId);
  const inTurn = [...entries.slice(place + 1), ...entries.slice(0, Math.max(place, 0))];
  return inTurn.find(({ isOwn, claimedBy }) => !isOwn && claimedBy !== 'other');
}
