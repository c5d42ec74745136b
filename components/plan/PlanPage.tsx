import { useQuery } from '@tanstack/react-query';
import { useLocalSearchParams } from 'expo-router';

import { QueryView } from '@/components/QueryView';
import { EmptyState, LoadingState, Page, PageHead, Skeleton, SkeletonRows } from '@/components/ui';
import { cellListQuery } from '@/lib/client/cells';

import { plansOfAddress } from './planAddress';
import { PlanView } from './PlanView';

/** What a bank of one's own would cost per kWh and how long it would last. */
export function PlanPage() {
  const query = useQuery(cellListQuery());
  const params = useLocalSearchParams();
  return (
    <Page>
      <PageHead
        title="Plan a bank"
        documentTitle="Plan a home storage bank"
        sub="How long it lasts, what a kWh costs, and which size is cheapest, from measured fade."
      />
      <QueryView
        query={query}
        loading={
          <LoadingState label="Loading the measured fade">
            <Skeleton height={120} />
            <SkeletonRows count={4} height={72} />
          </LoadingState>
        }
      >
        {(list) =>
          list.model ? (
            <PlanView model={list.model} cells={list.cells} startsWith={plansOfAddress(params)} />
          ) : (
            <EmptyState title="Nothing is measured yet">
              A plan needs checks of at least five owners. There are none published yet.
            </EmptyState>
          )
        }
      </QueryView>
    </Page>
  );
}
