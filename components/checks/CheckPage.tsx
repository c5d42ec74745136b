import { useQuery } from '@tanstack/react-query';

import { QueryPage } from '@/components/QueryPage';
import { LoadingState, Skeleton, SkeletonRows } from '@/components/ui';
import { bankQuery } from '@/lib/client/banks';
import { bankChecksQuery, checkQuery } from '@/lib/client/checks';

import { CheckView } from './CheckView';

/** One check of one's own bank: where it stands, its figures, what was said about it. */
export function CheckPage({ bankId, checkId }: { bankId: string; checkId: string }) {
  const bank = useQuery(bankQuery(bankId));
  const check = useQuery(checkQuery(checkId));
  const checks = useQuery(bankChecksQuery(bankId));
  const frame = {
    title: 'Check',
    back: { href: { pathname: '/banks/[bankId]', params: { bankId } }, label: 'The bank' },
    loading: <CheckSkeleton />,
  } as const;
  return (
    <QueryPage {...frame} query={check}>
      {(loadedCheck) => (
        <QueryPage {...frame} query={bank}>
          {(loadedBank) => (
            <QueryPage {...frame} query={checks}>
              {(all) => <CheckView bank={loadedBank} check={loadedCheck} checks={all} />}
            </QueryPage>
          )}
        </QueryPage>
      )}
    </QueryPage>
  );
}

function CheckSkeleton() {
  return (
    <LoadingState label="Loading the check">
      <Skeleton height={120} />
      <SkeletonRows count={6} height={32} />
    </LoadingState>
  );
}
