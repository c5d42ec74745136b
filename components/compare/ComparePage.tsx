import { useQuery } from '@tanstack/react-query';

import { useAddressed } from '@/components/chosenUse/useAddressed';
import { useChosenUse } from '@/components/chosenUse/useChosenUse';
import { QueryView } from '@/components/QueryView';
import { EmptyState, LoadingState, Page, PageHead, Skeleton, SkeletonRows } from '@/components/ui';
import { cellListQuery } from '@/lib/client/cells';

import { CompareView } from './CompareView';
import { comparedPart } from './comparedCells';

/** Up to four cell types side by side at one use; the address reproduces it. */
export function ComparePage() {
  const query = useQuery(cellListQuery());
  const chosen = useChosenUse();
  const [compared, setCompared] = useAddressed(comparedPart);
  return (
    <Page>
      <PageHead
        title="Compare cell types"
        documentTitle="Compare cell types by measured life"
        sub="Up to four, at the use you choose, measured beside what their labels imply."
      />
      <QueryView
        query={query}
        loading={
          <LoadingState label="Loading the cell types">
            <Skeleton height={96} />
            <SkeletonRows count={4} height={72} />
          </LoadingState>
        }
      >
        {(list) =>
          list.model ? (
            <CompareView
              list={list}
              model={list.model}
              chosen={chosen}
              compared={compared}
              onCompare={(ids) => setCompared({ ids, notes: [] })}
            />
          ) : (
            <EmptyState title="Nothing is measured yet">
              A comparison needs checks of at least five owners. There are none published yet.
            </EmptyState>
          )
        }
      </QueryView>
    </Page>
  );
}
