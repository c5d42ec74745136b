import { useInfiniteQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { QueryView } from '@/components/QueryView';
import { Button, LoadingState, Quiet, SelectField, SkeletonRows, Stack } from '@/components/ui';
import { queueQuery } from '@/lib/client/moderation';
import type { CheckState } from '@/lib/contract/checks';
import type { Queue } from '@/lib/contract/moderation';
import { formatCount } from '@/lib/units';

import { QueueList } from './QueueList';

const stateWords: Partial<Record<CheckState, string>> = {
  submitted: 'Waiting',
  sentBack: 'Sent back, with the owner',
  approved: 'Approved',
  turnedAway: 'Turned away',
  withdrawn: 'Withdrawn',
  recalled: 'Recalled',
};

/** The queue with its filter by state and the counts of each. */
export function QueuePanel({ currentId }: { currentId?: string }) {
  const [state, setState] = useState<CheckState>('submitted');
  const query = useInfiniteQuery(queueQuery(state));
  const counts = query.data?.pages[0]?.counts ?? {};
  return (
    <Stack gap="m">
      <SelectField
        label="Show"
        value={state}
        options={Object.entries(stateWords).map(([value, label]) => ({
          value,
          label: `${label} (${formatCount(counts[value as CheckState] ?? 0)})`,
        }))}
        onChange={(value) => setState(value as CheckState)}
      />
      <QueryView
        query={query}
        loading={
          <LoadingState label="Loading the queue">
            <SkeletonRows count={8} height={76} />
          </LoadingState>
        }
      >
        {({ pages }) => (
          <>
            {state === 'submitted' && <Quiet>{waitingWords(pages[0])}</Quiet>}
            <QueueList
              entries={pages.flatMap(({ entries }) => entries)}
              currentId={currentId}
              now={new Date()}
            />
            {query.hasNextPage && (
              <Button
                label="Show more"
                busy={query.isFetchingNextPage}
                onPress={() => void query.fetchNextPage()}
              />
            )}
          </>
        )}
      </QueryView>
    </Stack>
  );
}

function waitingWords(queue: Queue | undefined): string {
  const count = queue?.counts.submitted ?? 0;
  return `${formatCount(count)} waiting. Doubtful first, then the oldest.`;
}
