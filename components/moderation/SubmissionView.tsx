import { Beside, CheckStateChip, Heading, PageHead, Row, Stack, Text } from '@/components/ui';
import type { Submission } from '@/lib/contract/moderation';

import { ConversationList } from '../checks/ConversationList';
import { BankFacts } from './BankFacts';
import { DecisionBar } from './DecisionBar';
import { FindingList } from './FindingList';
import { SubmissionCharts } from './SubmissionCharts';
import { SubmissionFigures } from './SubmissionFigures';
import { layoutWords, submissionLine } from './submissionWords';

/** A submission whole: decision at the head, curve and figures, findings beside them, history and conversation below. */
export function SubmissionView({ submission }: { submission: Submission }) {
  const { bank, state } = submission;
  const title = `${bank.cellType.name}, ${layoutWords(bank)}`;
  return (
    <Stack gap="l">
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
        actions={<DecisionBar submission={submission} />}
      />
      <Beside aside={<FindingList findings={submission.findings} />}>
        <SubmissionCharts submission={submission} />
        <SubmissionFigures submission={submission} />
        <BankFacts submission={submission} />
        <Stack gap="s">
          <Heading>Conversation and trail</Heading>
          <ConversationList messages={submission.conversation} />
        </Stack>
      </Beside>
    </Stack>
  );
}
