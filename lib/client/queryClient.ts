import { MutationCache, QueryCache, QueryClient } from '@tanstack/react-query';

import { ApiError, isSessionLost } from './http';
import { sessionKey } from './session';

const minuteMs = 60_000;

/** An answer that is older is asked for anew when it is shown. */
export const staleAfterMs = minuteMs;

/**
 * The app's cache of server data. Requests run without asking the browser whether it is online, so that a dead
 * connection shows as an error with a retry and not as loading for ever. Refusals are not tried again.
 */
export function createQueryClient(): QueryClient {
  const onError = (error: unknown) => {
    if (isSessionLost(error)) void client.invalidateQueries({ queryKey: sessionKey });
  };
  const client = new QueryClient({
    queryCache: new QueryCache({ onError }),
    mutationCache: new MutationCache({ onError }),
    defaultOptions: {
      queries: {
        networkMode: 'always',
        refetchOnReconnect: true,
        staleTime: staleAfterMs,
        gcTime: 30 * minuteMs,
        retry: canRetry,
      },
      mutations: { networkMode: 'always', retry: false },
    },
  });
  return client;
}

/** Twice for no answer and for failures of the server; never for a refusal. */
function canRetry(failures: number, error: Error): boolean {
  if (!(error instanceof ApiError)) return false;
  return failures < 2 && (error.code === 'offline' || error.status >= 500);
}
