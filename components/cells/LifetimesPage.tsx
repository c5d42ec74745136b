import { useQuery } from '@tanstack/react-query';

import { type AddressPart, useAddressed } from '@/components/chosenUse/useAddressed';
import { useChosenUse } from '@/components/chosenUse/useChosenUse';
import { QueryView } from '@/components/QueryView';
import { LoadingState, Page, PageHead, Skeleton, SkeletonRows } from '@/components/ui';
import { cellListQuery } from '@/lib/client/cells';

import { LifetimeList } from './LifetimeList';
import { type ListView, listViewQuery, readListView } from './listView';
import { poolSentence } from './poolWords';

const viewPart: AddressPart<ListView> = { read: readListView, write: listViewQuery };

/** The visitor's first page: measured lives of all cell types at one stated use. */
export function LifetimesPage() {
  const query = useQuery(cellListQuery());
  const chosen = useChosenUse();
  const [view, onViewChange] = useAddressed(viewPart);
  return (
    <Page>
      <PageHead
        title="How long home battery cells last, measured"
        documentTitle="Lifetimes of home battery cells"
        sub={query.data ? poolSentence(query.data.pool) : 'Counting the checks behind this page.'}
      />
      <QueryView query={query} loading={<ListSkeleton />}>
        {(list) => <LifetimeList {...{ list, chosen, view, onViewChange }} />}
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
