import { LoadingState, Page, Skeleton, SkeletonRows } from '../ui';

/** In a page's place while its part of the program is on its way. */
export function PageSkeleton() {
  return (
    <Page>
      <LoadingState label="Loading the page">
        <Skeleton width="60%" height={36} />
        <SkeletonRows />
      </LoadingState>
    </Page>
  );
}
