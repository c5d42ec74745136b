import { useInfiniteQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { QueryView } from '@/components/QueryView';
import { Button, LoadingState, Quiet, SkeletonRows, Stack } from '@/components/ui';
import { queueQuery } from '@/lib/client/moderation';
import type { Queue } from '@/lib/contract/moderation';
import { formatCount } from '@/lib/units';

import { CleanDialog } from './CleanDialog';
import { useQueueFilters } from './queueFilters';
import { QueueFilterFields } from './QueueFilterFields';
import { QueueList } from './QueueList';
import { UndoNote } from './UndoNote';

/** The queue with its filters, the counts of each, and what can be approved together. */
export function QueuePanel({ currentId }: { currentId?: string }) {
  const filters = useQueueFilters();
  const query = useInfiniteQuery(queueQuery(filters));
  const [isPreviewing, setIsPreviewing] = useState(false);
  const first = query.data?.pages[0];
  const clean = filters.state === 'submitted' ? (first?.facets?.severities.fits ?? 0) : 0;
  return (
    <Stack gap="m">
      {currentId === undefined && <UndoNote />}
      <QueueFilterFields filters={filters} queue={first} />
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
            {filters.state === 'submitted' && <Quiet>{waitingWords(pages[0])}</Quiet>}
            <QueueList
              entries={pages.flatMap(({ entries }) => entries)}
              filters={filters}
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
            {clean > 1 && (
              <Button
                label={`Approve clean ones (${formatCount(clean)})`}
                onPress={() => setIsPreviewing(true)}
              />
            )}
          </>
        )}
      </QueryView>
      {isPreviewing && <CleanDialog onClose={() => setIsPreviewing(false)} />}
    </Stack>
  );
}

function waitingWords(queue: Queue | undefined): string {
  const count = queue?.counts.submitted ?? 0;
  return `${formatCount(count)} waiting. Doubtful first, then the oldest.`;
}
