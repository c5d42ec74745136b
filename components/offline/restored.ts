import type { QueryClient } from '@tanstack/react-query';

import { restoreAnswers } from '@/lib/client/keptAnswers';

const begun = new WeakMap<QueryClient, Map<string, Promise<void>>>();

/** Ends when an account's kept answers are in the cache; done once for each. */
export function restored(client: QueryClient, userId: string): Promise<void> {
  const ofClient = begun.get(client) ?? new Map<string, Promise<void>>();
  begun.set(client, ofClient);
  const before = ofClient.get(userId);
  if (before) return before;
  const restoring = restoreAnswers(client, userId);
  ofClient.set(userId, restoring);
  return restoring;
}
