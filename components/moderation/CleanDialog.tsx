import { useInfiniteQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { QueryView } from '@/components/QueryView';
import { Banner, Button, Checkbox, Dialog, LoadingState, Quiet, SkeletonRows, Stack } from '@/components/ui';
import { queueQuery, useApproveClean } from '@/lib/client/moderation';
import type { QueueEntry } from '@/lib/contract/moderation';
import { formatAgo, formatCount } from '@/lib/units';

/** Checks on which the screening found nothing, to be looked over and approved together. */
export function CleanDialog({ onClose }: { onClose: () => void }) {
  const query = useInfiniteQuery(queueQuery({ state: 'submitted', severity: 'fits' }));
  const [left, setLeft] = useState<ReadonlySet<string>>(new Set());
  const approve = useApproveClean();
  const entries = query.data?.pages[0]?.entries ?? [];
  const free = entries.filter(({ isOwn, claimedBy }) => !isOwn && claimedBy !== 'other');
  const chosen = free.filter(({ checkId }) => !left.has(checkId));
  const results = approve.data?.results ?? [];
  const problems = results.filter(({ problem }) => problem !== null);
  const nameOf = (checkId: string) => entries.find((entry) => entry.checkId === checkId)?.pseudonym ?? 'One';

  const send = () =>
    approve.mutate(chosen, {
      onSuccess: ({ results: done }) => {
        if (done.every(({ problem }) => problem === null)) onClose();
      },
    });
  const toggle = (checkId: string, isChosen: boolean) => {
    const next = new Set(left);
    if (isChosen) next.delete(checkId);
    else next.add(checkId);
    setLeft(next);
  };

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Approve clean ones"
      actions={
        <>
          <Button label="Approve none" onPress={onClose} />
          <Button
            label={`Approve ${formatCount(chosen.length)}`}
            kind="primary"
            onPress={send}
            busy={approve.isPending}
            disabled={chosen.length === 0}
          />
        </>
      }
    >
      <Stack gap="m">
        <Quiet>
          The screening found nothing on these. Those that others are at work on, and your own, are left out.
        </Quiet>
        <QueryView
          query={query}
          loading={
            <LoadingState label="Loading the clean ones">
              <SkeletonRows count={5} height={44} />
            </LoadingState>
          }
        >
          {() => (
            <Stack gap="xs">
              {free.map((entry) => (
                <Checkbox
                  key={entry.checkId}
                  label={lineOf(entry)}
                  checked={!left.has(entry.checkId)}
                  onChange={(isChosen) => toggle(entry.checkId, isChosen)}
                />
              ))}
              {free.length === 0 && <Quiet>There are none just now.</Quiet>}
            </Stack>
          )}
        </QueryView>
        {problems.length > 0 && (
          <Banner kind="caution" title="Some were not approved">
            {problems.map(({ checkId, problem }) => `${nameOf(checkId)}: ${problem}`).join(' ')}
          </Banner>
        )}
        {approve.isError && <Banner kind="error">{approve.error.message}</Banner>}
      </Stack>
    </Dialog>
  );
}

const lineOf = ({ pseudonym, cellType, layout, submittedAt }: QueueEntry) =>
  `${pseudonym}: ${cellType.name}, ${layout}, ${formatAgo(submittedAt, new Date())}`;
