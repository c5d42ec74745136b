import type { ReactNode } from 'react';

import { useLayout } from '@/components/theme';
import { Beside, CheckStateChip, Heading, PageHead, Row, Stack, Text } from '@/components/ui';
import type { Submission } from '@/lib/contract/moderation';

import { ConversationList } from '../checks/ConversationList';
import { PhotoView } from '../checks/PhotoView';
import { BankFacts } from './BankFacts';
import { DecisionBar } from './DecisionBar';
import { FindingList } from './FindingList';
import { SubmissionCharts } from './SubmissionCharts';
import { SubmissionFigures } from './SubmissionFigures';
import { layoutWords, submissionLine } from './submissionWords';

/** A submission whole: decision at the head, curve and figures, findings beside them, history and conversation below. */
export function SubmissionView({ submission }: { submission: Submission }) {
  const { isWide, isPhone } = useLayout();
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
  const rest = (
    <>
      <BankFacts submission={submission} />
      <Stack gap="s">
        <Heading>Conversation and trail</Heading>
        <ConversationList messages={submission.conversation} />
      </Stack>
    </>
  );
  const evidence = (
    <>
      <SubmissionCharts submission={submission} />
      <SubmissionFigures submission={submission} />
    </>
  );
  const decision = <DecisionBar submission={submission} />;
  return (
    <Stack gap="l" style={isPhone && { flexGrow: 1 }}>
      <SubmissionHead submission={submission} actions={isPhone ? undefined : decision} />
      {isWide ? (
        <Beside aside={findings}>
          {evidence}
          {rest}
        </Beside>
      ) : (
        <>
          {findings}
          {evidence}
          {rest}
        </>
      )}
      {isPhone && decision}
    </Stack>
  );
}

function SubmissionHead({ submission, actions }: { submission: Submission; actions: ReactNode }) {
  const { bank, state } = submission;
  const title = `${bank.cellType.name}, ${layoutWords(bank)}`;
  return (
    <PageHead
      title={title}
      documentTitle={`Bank ${bank.pseudonym}, ${title}`}
      back={{ href: '/screening', label: 'Screening' }}
      sub={
        <Row gap="s">
          <Text tone="quiet">{submissionLine(submission)}</Text>
          {state !== 'submitted' && <CheckStateChip state={state} />}
        </Row>
      }
      actions={actions}
    />
  );
}
