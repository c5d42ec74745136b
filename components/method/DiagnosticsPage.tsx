import { useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import { EmptyState, LoadingState, Page, PageHead, Skeleton, Stack } from '@/components/ui';
import { publicFitQuery } from '@/lib/client/fits';
import type { PublicFit } from '@/lib/contract/fits';
import { useSession } from '@/lib/client/session';

import { ClampingPart } from './ClampingPart';
import { CoveragePart } from './CoveragePart';
import { fitSentence } from './fitWords';
import { HistoryPart } from './HistoryPart';
import { ResidualPart } from './ResidualPart';
import { ScreenPart } from './ScreenPart';
import { StrataPart } from './StrataPart';

/** Whether the model fits: what it predicts against what was measured, from every side. */
export function DiagnosticsPage() {
  const query = useQuery(publicFitQuery());
  const { user } = useSession();
  const isScreener = user !== null && user.role !== 'owner';
  return (
    <Page>
      <PageHead
        back={{ href: '/method', label: 'Method' }}
        title="Does the model fit"
        documentTitle="Diagnostics of the fit"
        sub={
          query.data?.fit
            ? fitSentence(query.data.fit)
            : 'What the public fit predicts against what was measured.'
        }
      />
      <QueryView query={query} loading={<DiagnosticsSkeleton />}>
        {(report) => (
          <Stack gap="xl">
            <Report report={report} />
            {isScreener && <ScreenPart />}
          </Stack>
        )}
      </QueryView>
    </Page>
  );
}

function Report({ report: { fit, history } }: { report: PublicFit }) {
  if (!fit)
    return (
      <EmptyState title="No fit yet">
        The public pool has not been fitted. Pictures appear here when checks of at least 5 owners are in it.
      </EmptyState>
    );
  return (
    <Stack gap="xl">
      <CoveragePart fit={fit} />
      <ResidualPart fit={fit} />
      <StrataPart fit={fit} />
      <ClampingPart fit={fit} />
      <HistoryPart history={history} />
    </Stack>
  );
}

const DiagnosticsSkeleton = () => (
  <LoadingState label="Loading the diagnostics">
    <Skeleton height={120} />
    <Skeleton height={380} />
    <Skeleton height={380} />
  </LoadingState>
);
