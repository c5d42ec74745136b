import type { UseQueryResult } from '@tanstack/react-query';
import type { ReactNode } from 'react';

import { Page, PageHead, type PageHeadProps } from '@/components/ui';

import { QueryView } from './QueryView';

interface QueryPageProps<Data> extends Pick<PageHeadProps, 'title' | 'back'> {
  query: UseQueryResult<Data>;
  narrow?: boolean;
  /** Skeleton in the shape of what stands under the title. */
  loading: ReactNode;
  /** The page whole, with its own head. */
  children: (data: Data) => ReactNode;
}

/** A page that hangs on a query: until its data are there it has its title, with the skeleton or what went wrong. */
export function QueryPage<Data>({ query, title, back, narrow, loading, children }: QueryPageProps<Data>) {
  if (query.data !== undefined) return <>{children(query.data)}</>;
  return (
    <Page narrow={narrow}>
      <PageHead title={title} back={back} />
      <QueryView query={query} loading={loading}>
        {() => null}
      </QueryView>
    </Page>
  );
}
