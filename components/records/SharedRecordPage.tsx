import { useQuery } from '@tanstack/react-query';

import { QueryPage } from '@/components/QueryPage';
import { LoadingState, Page, PageHead, Skeleton, SkeletonRows } from '@/components/ui';
import { sharedRecordQuery } from '@/lib/client/records';

import { RecordSheet } from './RecordSheet';

/** What stands behind the link of a health record: the record as issued, or that it was withdrawn and nothing else. */
export function SharedRecordPage({ token }: { token: string }) {
  const query = useQuery(sharedRecordQuery(token));
  return (
    <QueryPage
      query={query}
      title="Health record"
      loading={
        <LoadingState label="Loading the health record">
          <Skeleton height={120} />
          <SkeletonRows count={6} height={32} />
        </LoadingState>
      }
    >
      {(record) =>
        record.state === 'withdrawn' ? (
          <Page narrow>
            <PageHead
              title="This health record was withdrawn"
              documentTitle="Withdrawn health record"
              sub="Copies of it no longer stand."
            />
          </Page>
        ) : (
          <RecordSheet record={record} />
        )
      }
    </QueryPage>
  );
}
