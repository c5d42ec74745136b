import { useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import {
  EmptyState,
  Heading,
  Link,
  LoadingState,
  Page,
  PageHead,
  Quiet,
  Skeleton,
  SkeletonRows,
  Stack,
} from '@/components/ui';
import { agreementQuery, blindListQuery } from '@/lib/client/agreement';
import type { BlindList } from '@/lib/contract/agreement';
import { formatDate } from '@/lib/units';

import { ScreeningTabs } from '../moderation/ScreeningTabs';
import { AgreementFigures } from './AgreementFigures';
import { DifferingCases } from './DifferingCases';

/** Whether moderators judge alike: what waits for a second look, how far two agree, and where they did not. */
export function AgreementPage() {
  const figures = useQuery(agreementQuery);
  const waiting = useQuery(blindListQuery);
  return (
    <Page>
      <PageHead
        title="Agreement"
        sub="One decided submission in twenty goes to a second moderator, who does not know the decision."
      />
      <ScreeningTabs />
      <Stack gap="s">
        <Heading level={2}>Waiting for your second look</Heading>
        <QueryView
          query={waiting}
          loading={
            <LoadingState label="Loading what waits">
              <SkeletonRows count={2} height={44} />
            </LoadingState>
          }
        >
          {(reviews) => <WaitingList reviews={reviews} />}
        </QueryView>
      </Stack>
      <QueryView
        query={figures}
        loading={
          <LoadingState label="Loading the agreement">
            <Skeleton height={92} />
            <SkeletonRows count={5} height={36} />
          </LoadingState>
        }
      >
        {(agreement) =>
          agreement.done === 0 ? (
            <EmptyState title="Nothing has been looked at twice yet">
              Once second verdicts are given, the agreement stands here with the cases that differ.
            </EmptyState>
          ) : (
            <>
              <AgreementFigures agreement={agreement} />
              <DifferingCases cases={agreement.differing} />
            </>
          )
        }
      </QueryView>
    </Page>
  );
}

function WaitingList({ reviews }: { reviews: BlindList['reviews'] }) {
  if (reviews.length === 0) return <Quiet>Nothing waits for you. Which ones come is drawn.</Quiet>;
  return (
    <Stack gap="s">
      {reviews.map(({ reviewId, pseudonym, cellType, layout, drawnAt }) => (
        <Stack key={reviewId} gap="hair">
          <Link
            href={`/screening/blind/${reviewId}`}
          >{`Bank ${pseudonym}, ${cellType.name}, ${layout}`}</Link>
          <Quiet>{`Drawn on ${formatDate(drawnAt.slice(0, 10))}`}</Quiet>
        </Stack>
      ))}
    </Stack>
  );
}
