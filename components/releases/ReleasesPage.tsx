import { useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import { StewardHead } from '@/components/steward/StewardHead';
import {
  Banner,
  type Column,
  Heading,
  LoadingState,
  Page,
  Quiet,
  SkeletonRows,
  Stack,
  Table,
  Text,
} from '@/components/ui';
import { releaseListQuery, releasePreviewQuery } from '@/lib/client/releases';
import type { ReleasePreview } from '@/lib/contract/releases';
import { formatCount } from '@/lib/units';

import { MakeReleaseForm } from './MakeReleaseForm';
import { ReleaseCard } from './ReleaseCard';
import { changeWords, evidenceWords, heldWords, moveWords } from './releaseWords';

const moveColumns: Column<ReleasePreview['moves'][number]>[] = [
  { key: 'cell', title: 'Cell type', cell: ({ cellType }) => cellType ?? 'average' },
  { key: 'move', title: 'Years to 80 % at the standard use', cell: moveWords },
];
const levelColumns: Column<ReleasePreview['levels'][number]>[] = [
  { key: 'name', title: 'Told', cell: ({ name }) => name },
  { key: 'banks', title: 'Banks', figures: true, cell: ({ banks }) => formatCount(banks) },
];

/** What the next release would hold, and the releases so far. */
export function ReleasesPage() {
  const preview = useQuery(releasePreviewQuery());
  const list = useQuery(releaseListQuery());
  return (
    <Page>
      <StewardHead
        title="Releases"
        sub="A look at the next release before it is made. A release is never changed."
      />
      <QueryView
        query={preview}
        loading={
          <LoadingState label="Working out the next release">
            <SkeletonRows count={6} height={40} />
          </LoadingState>
        }
      >
        {(next) => <Preview next={next} />}
      </QueryView>
      <QueryView query={list} loading={null}>
        {({ releases }) => (
          <Stack gap="xl">
            {releases.map((release) => (
              <ReleaseCard key={release.number} release={release} />
            ))}
          </Stack>
        )}
      </QueryView>
    </Page>
  );
}

function Preview({ next }: { next: ReleasePreview }) {
  const { number, evidence, changes, held, moves, levels, isMaking, lastProblem } = next;
  const isNew = changes.came + changes.left + changes.changed > 0;
  return (
    <Stack gap="l">
      <Heading>{`The next one: release ${number}`}</Heading>
      {lastProblem && (
        <Banner kind="error" title="No release was made">
          {lastProblem}
        </Banner>
      )}
      <Text>{`${evidence ? `${evidenceWords({ evidence })}. ` : ''}Banks: ${changeWords(changes)}.`}</Text>
      <Stack gap="xs">
        <Heading level={3}>What waits, and why</Heading>
        {held.length === 0 && <Quiet>Nothing waits.</Quiet>}
        {held.map((group, i) => (
          <Text key={i}>{heldWords(group)}</Text>
        ))}
      </Stack>
      <Table
        caption="How published figures would move"
        showCaption
        columns={moveColumns}
        rows={moves}
        rowKey={({ cellType }) => cellType ?? 'average'}
      />
      <Table
        caption="How exactly banks are told of"
        showCaption
        columns={levelColumns}
        rows={levels}
        rowKey={({ name }) => name}
      />
      {isNew || isMaking ? (
        <MakeReleaseForm number={number} isMaking={isMaking} />
      ) : (
        <Quiet>There is nothing to release that is not public already.</Quiet>
      )}
    </Stack>
  );
}
