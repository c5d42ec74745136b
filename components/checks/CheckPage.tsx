import { useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import { LoadingState, Page, Skeleton, SkeletonRows } from '@/components/ui';
import { bankQuery } from '@/lib/client/banks';
import { bankChecksQuery, checkQuery } from '@/lib/client/checks';

import { CheckView } from './CheckView';

/** One check of one's own bank: where it stands, its figures, what was said about it. */
export function CheckPage({ bankId, checkId }: { bankId: string; checkId: string }) {
  const bank = useQuery(bankQuery(bankId));
  const check = useQuery(checkQuery(checkId));
  const checks = useQuery(bankChecksQuery(bankId));
  return (
    <Page>
      <QueryView query={check} loading={<CheckSkeleton />}>
        {(loadedCheck) => (
          <QueryView query={bank} loading={<CheckSkeleton />}>
            {(loadedBank) => (
              <QueryView query={checks} loading={<CheckSkeleton />}>
                {(all) => <CheckView bank={loadedBank} check={loadedCheck} checks={all} />}
              </QueryView>
            )}
          </QueryView>
        )}
      </QueryView>
    </Page>
  );
}

function CheckSkeleton() {
  return (
    <LoadingState label="Loading the check">
      <Skeleton height={64} width="60%" />
      <Skeleton height={120} />
      <SkeletonRows count={6} height={32} />
    </LoadingState>
  );
}
