import { queryOptions, useQuery } from '@tanstack/react-query';

import { readSession } from './sessionTokens';

export const sessionKey = ['session'] as const;

/** Who the browser is signed in as; `user` is null for a visitor. */
export const sessionQuery = queryOptions({
  queryKey: sessionKey,
  queryFn: readSession,
  staleTime: 5 * 60_000,
});

/** The session as a screen needs it: while `isPending` nothing is known yet. */
export function useSession() {
  const { data, isPending, isFetching, error, refetch } = useQuery(sessionQuery);
  const [user, isDemo] = [data?.user ?? null, data?.isDemo ?? false];
  return { session: data, user, isDemo, isPending, isFetching, error, refetch };
}
