import { useQuery } from '@tanstack/react-query';

import { QueryPage } from '@/components/QueryPage';
import { useLayout } from '@/components/theme';
import {
  Beside,
  Heading,
  LoadingState,
  Page,
  PageHead,
  Skeleton,
  SkeletonRows,
  Stack,
} from '@/components/ui';
import { blindSubmissionQuery } from '@/lib/client/agreement';
import type { BlindSubmission } from '@/lib/contract/agreement';
import type { Submission } from '@/lib/contract/moderation';

import { ConversationList } from '../checks/ConversationList';
import { PhotoView } from '../checks/PhotoView';
import { BankFacts } from '../moderation/BankFacts';
import { FindingList } from '../moderation/FindingList';
import { SubmissionCharts } from '../moderation/SubmissionCharts';
import { SubmissionFigures } from '../moderation/SubmissionFigures';
import { layoutWords } from '../moderation/submissionWords';
import { VerdictForm } from './VerdictForm';

const back = { href: '/screening/agreement', label: 'Agreement' } as const;

/** A submission as it stood before its decision, for a verdict that does not know it. */
export function BlindReviewPage({ reviewId }: { reviewId: string }) {
  const query = useQuery(blindSubmissionQuery(reviewId));
  return (
    <QueryPage
      query={query}
      title="A second look"
      back={back}
      loading={
        <LoadingState label="Loading the submission">
          <Skeleton height={72} />
          <SkeletonRows count={6} height={40} />
        </LoadingState>
      }
    >
      {(blind) => <BlindView blind={blind} />}
    </QueryPage>
  );
}

/** As the queue's page would show it while it waits. */
const asSubmission = (blind: BlindSubmission): Submission => ({
  ...blind,
  ...{ version: 1, state: 'submitted', isOwn: false, claim: null, correction: null, undo: null },
  ...{ isRealFailure: false, mergedIntoId: null, workingFittedAt: null },
  secondOpinion: { isNeeded: false, largest: null, proposal: null },
});

function BlindView({ blind }: { blind: BlindSubmission }) {
  const { isWide } = useLayout();
  const submission = asSubmission(blind);
  const { photoId } = submission.fields;
  const findings = (
    <Stack gap="l">
      <FindingList findings={submission.findings} />
      {photoId !== null && (
        <Stack gap="s">
          <Heading>Photo of the meter</Heading>
          <PhotoView photoId={photoId} />
        </Stack>
      )}
    </Stack>
  );
  const matter = (
    <>
      <SubmissionCharts submission={submission} />
      <SubmissionFigures submission={submission} />
      <BankFacts submission={submission} />
      <Stack gap="s">
        <Heading>Conversation</Heading>
        <ConversationList messages={submission.conversation} />
      </Stack>
      <VerdictForm reviewId={blind.reviewId} />
    </>
  );
  return (
    <Page>
      <PageHead
        title={`${blind.bank.cellType.name}, ${layoutWords(blind.bank)}`}
        documentTitle={`A second look at bank ${blind.bank.pseudonym}`}
        back={back}
        sub={`A second look: bank ${blind.bank.pseudonym} as it stood before it was decided on. Your verdict changes nothing by itself.`}
      />
      {isWide ? (
        <Beside aside={findings}>{matter}</Beside>
      ) : (
        <>
          {findings}
          {matter}
        </>
      )}
    </Page>
  );
}
