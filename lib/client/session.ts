import { queryOptions, useQuery } from '@tanstack/react-query';

import type { Session } from '@/lib/contract/accounts';

import { ApiError } from './apiError';
import { rememberAccount, rememberedAccount } from './rememberedAccount';
import { readSession } from './sessionTokens';

export const sessionKey = ['session'] as const;

/** A session; `isRemembered`: the server could not be asked, and the one before is taken for it. */
export interface KnownSession extends Session {
  isRemembered?: true;
}

/** Who the browser is signed in as; `user` is null for a visitor. Without a network: who it was. */
export const sessionQuery = queryOptions({
  queryKey: sessionKey,
  queryFn: async (): Promise<KnownSession> => {
    try {
      return rememberAccount(await readSession());
    } catch (error) {
      const before = rememberedAccount();
      const isOffline = error instanceof ApiError && error.code === 'offline';
      if (!isOffline || !before || before.hasRunOut) throw error;
      const { user, isDemo } = before;
      return { user, isDemo, csrfToken: '', canRefresh: false, isRemembered: true };
    }
  },
  staleTime: ({ state }) => (state.data?.isRemembered ? 0 : 5 * 60_000),
});

/** The session as a screen needs it: while `isPending` nothing is known yet. */
export function useSession() {
  const { data, isPending, isFetching, error, refetch } = useQuery(sessionQuery);
  const [user, isDemo] = [data?.user ?? null, data?.isDemo ?? false];
  const isRemembered = data?.isRemembered ?? false;
  return { session: data, user, isDemo, isRemembered, isPending, isFetching, error, refetch };
}
