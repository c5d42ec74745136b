import { useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import { useLayout } from '@/components/theme';
import { Beside, LoadingState, Page, Skeleton, SkeletonRows } from '@/components/ui';
import { submissionQuery } from '@/lib/client/moderation';

import { QueuePanel } from './QueuePanel';
import { SubmissionView } from './SubmissionView';

/** One submission with its evidence and the decision; the queue stays beside it on a wide screen. */
export function SubmissionPage({ checkId }: { checkId: string }) {
  const { isWide } = useLayout();
  const query = useQuery(submissionQuery(checkId));
  const matter = (
    <QueryView query={query} loading={<SubmissionSkeleton />}>
      {(submission) => <SubmissionView key={submission.checkId} submission={submission} />}
    </QueryView>
  );
  if (!isWide) return <Page>{matter}</Page>;
  return (
    <Page>
      <Beside side="start" aside={<QueuePanel currentId={checkId} />}>
        {matter}
      </Beside>
    </Page>
  );
}

function SubmissionSkeleton() {
  return (
    <LoadingState label="Loading the submission">
      <Skeleton height={72} />
      <Skeleton height={300} />
      <SkeletonRows count={6} height={28} />
    </LoadingState>
  );
}
