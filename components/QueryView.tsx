import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';

import { ErrorState, OfflineState } from '@/components/ui';
import { ApiError } from '@/lib/client/http';

interface QueryViewProps<Data> {
  query: UseQueryResult<Data>;
  /** Skeleton in the page's own shape. */
  loading: ReactNode;
  children: (data: Data) => ReactNode;
}

/** What a query has to show: its data, else its skeleton, else what went wrong with a way to try again. */
export function QueryView<Data>({ query, loading, children }: QueryViewProps<Data>) {
  if (query.data !== undefined) return <>{children(query.data)}</>;
  if (!query.isError) return <>{loading}</>;
  const retry = { onRetry: () => void query.refetch(), isRetrying: query.isFetching };
  const { error } = query;
  if (error instanceof ApiError && error.code === 'offline') return <OfflineState {...retry} />;
  if (error instanceof ApiError && error.code === 'notFound')
    return <ErrorState title="Not found">{error.message}</ErrorState>;
  return (
    <ErrorState {...retry} requestId={error instanceof ApiError ? error.requestId : undefined}>
      {error.message}
    </ErrorState>
  );
}
