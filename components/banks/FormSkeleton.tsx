import { LoadingState, Page, PageHead, Skeleton } from '@/components/ui';

/** A form that is still coming: its title, and fields in their size. */
export function FormSkeleton({ title, label }: { title: string; label: string }) {
  return (
    <Page narrow>
      <PageHead title={title} />
      <LoadingState label={label}>
        <Skeleton height={76} />
        <Skeleton height={76} />
        <Skeleton height={76} />
        <Skeleton height={140} />
      </LoadingState>
    </Page>
  );
}
