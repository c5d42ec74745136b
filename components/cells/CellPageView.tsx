import { keepPreviousData, useQuery } from '@tanstack/react-query';

import { useChosenUse } from '@/components/chosenUse/useChosenUse';
import { QueryView } from '@/components/QueryView';
import { Banner, LoadingState, Page, PageHead, Skeleton } from '@/components/ui';
import { cellPageQuery } from '@/lib/client/cells';
import type { Href } from 'expo-router';

import { CellDetails } from './CellDetails';
import { cellSubtitle } from './cellWords';

interface CellPageViewProps {
  cellId: string;
  band: string | undefined;
  onBandChange: (band: string | undefined) => void;
}

/** A cell type: capacity left at reach, life to 80 %, the label, the fade curve and the evidence. */
export function CellPageView({ cellId, band, onBandChange }: CellPageViewProps) {
  const query = useQuery({ ...cellPageQuery(cellId, band), placeholderData: keepPreviousData });
  const chosen = useChosenUse();
  const { data } = query;
  return (
    <Page>
      <PageHead
        back={{ href: `/${chosen.search}` as Href, label: 'Lifetimes' }}
        title={data?.cellType.name ?? 'Cell type'}
        documentTitle={data ? `${data.cellType.name}: measured life` : 'Cell type'}
        sub={data ? cellSubtitle(data) : undefined}
      />
      {data?.movedFrom && (
        <Banner kind="info">
          The cell type that was asked for turned out to be this one, and the two were made one.
        </Banner>
      )}
      <QueryView query={query} loading={<CellSkeleton />}>
        {(page) => <CellDetails {...{ page, chosen, onBandChange }} isUpdating={query.isPlaceholderData} />}
      </QueryView>
    </Page>
  );
}

function CellSkeleton() {
  return (
    <LoadingState label="Loading the cell type">
      <Skeleton height={92} />
      <Skeleton height={40} />
      <Skeleton height={420} />
    </LoadingState>
  );
}
