import { useInfiniteQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import { useLayout } from '@/components/theme';
import {
  Beside,
  Button,
  Disclosure,
  EmptyState,
  LoadingState,
  Page,
  SkeletonRows,
  Stack,
} from '@/components/ui';
import { trailQuery } from '@/lib/client/steward';

import { StewardHead } from './StewardHead';
import { TrailEntryRow } from './TrailEntryRow';
import { TrailFilterFields } from './TrailFilterFields';
import { useTrailFilters } from './trailFilters';

/** Everything that was done with checks, banks and accounts, newest first. */
export function TrailPage() {
  const filters = useTrailFilters();
  const query = useInfiniteQuery(trailQuery(filters));
  const { isWide } = useLayout();
  const fields = <TrailFilterFields filters={filters} />;
  const isNarrowed = Object.keys(filters).length > 0;
  return (
    <Page>
      <StewardHead
        title="Trail"
        sub="Everything that was done with checks, banks and accounts. Nothing in it can be changed or taken out; it holds numbers of accounts, no addresses."
      />
      <Beside
        side="start"
        aside={
          isWide ? (
            fields
          ) : (
            <Disclosure label="Narrow it down" startsOpen={isNarrowed}>
              {fields}
            </Disclosure>
          )
        }
      >
        <QueryView
          query={query}
          loading={
            <LoadingState label="Loading the trail">
              <SkeletonRows count={10} height={64} />
            </LoadingState>
          }
        >
          {({ pages }) => {
            const entries = pages.flatMap((page) => page.entries);
            if (entries.length === 0)
              return (
                <EmptyState title="Nothing here">No entry of the trail fits what is asked for.</EmptyState>
              );
            return (
              <Stack gap="l">
                <ol className="ebb-plain" aria-label="Entries, newest first">
                  {entries.map((entry) => (
                    <TrailEntryRow key={entry.id} entry={entry} />
                  ))}
                </ol>
                {query.hasNextPage && (
                  <Button
                    label="Show earlier ones"
                    busy={query.isFetchingNextPage}
                    onPress={() => void query.fetchNextPage()}
                  />
                )}
              </Stack>
            );
          }}
        </QueryView>
      </Beside>
    </Page>
  );
}
