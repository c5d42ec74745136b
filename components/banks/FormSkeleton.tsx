import { LoadingState, Skeleton } from '@/components/ui';

/** A form that is still coming: fields in their size. */
export function FormSkeleton({ label }: { label: string }) {
  return (
    <LoadingState label={label}>
      <Skeleton height={76} />
      <Skeleton height={76} />
      <Skeleton height={76} />
      <Skeleton height={140} />
    </LoadingState>
  );
}
