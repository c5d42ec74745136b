import { QueryView } from '@/components/QueryView';
import { LoadingState, Page, PageHead, Skeleton, SkeletonRows } from '@/components/ui';
import { cellListQuery } from '@/lib/client/cells';
import { useQuery } from '@tanstack/react-query';

import { LifetimeList } from './LifetimeList';
import { poolSentence } from './poolWords';

/** The visitor's first page: measured lives of all cell types at one stated use. */
export function LifetimesPage() {
  const query = useQuery(cellListQuery());
  return (
    <Page>
      <PageHead
        title="How long home battery cells last, measured"
        documentTitle="Lifetimes of home battery cells"
        sub={query.data ? poolSentence(query.data.pool) : 'Counting the checks behind this page.'}
      />
      <QueryView query={query} loading={<ListSkeleton />}>
        {(list) => <LifetimeList list={list} />}
      </QueryView>
    </Page>
  );
}

function ListSkeleton() {
  return (
    <LoadingState label="Loading lifetimes">
      <Skeleton height={52} />
      <SkeletonRows count={6} height={112} />
    </LoadingState>
  );
}
