import { useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import { LoadingState, Page, Skeleton, SkeletonRows, Stack } from '@/components/ui';
import { healthQuery } from '@/lib/client/steward';

import { FitsPart } from './FitsPart';
import { ProgramPart } from './ProgramPart';
import { QueuePart } from './QueuePart';
import { JobsPart, MailsPart } from './RetryParts';
import { StewardHead } from './StewardHead';
import { TrailPart } from './TrailPart';

/** How the exchange stands: what waits, what failed, and what keeps it going. */
export function HealthPage() {
  const query = useQuery(healthQuery);
  return (
    <Page>
      <StewardHead title="Health" sub="What waits, what failed, and what keeps the exchange going." />
      <QueryView
        query={query}
        loading={
          <LoadingState label="Looking at the exchange">
            <Skeleton height={80} />
            <SkeletonRows count={6} height={44} />
          </LoadingState>
        }
      >
        {(health) => (
          <Stack gap="xxl">
            <QueuePart queue={health.queue} />
            <JobsPart jobs={health.jobs} />
            <MailsPart mails={health.mails} />
            <FitsPart fits={health.fits} />
            <TrailPart trail={health.trail} />
            <ProgramPart health={health} />
          </Stack>
        )}
      </QueryView>
    </Page>
  );
}
