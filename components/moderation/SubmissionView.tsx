import { type ReactNode, useState } from 'react';

import { useLayout } from '@/components/theme';
import {
  Beside,
  Button,
  CheckStateChip,
  Heading,
  PageHead,
  Row,
  Stack,
  Text,
  useHotkeys,
} from '@/components/ui';
import type { Submission } from '@/lib/contract/moderation';

import { ConversationList } from '../checks/ConversationList';
import { PhotoView } from '../checks/PhotoView';
import { BankFacts } from './BankFacts';
import { DecisionBar } from './DecisionBar';
import { EffectPanel } from './EffectPanel';
import { FindingList } from './FindingList';
import { useAreKeysOn } from './keys';
import { KeysDialog } from './KeysDialog';
import { RecallAtOnce } from './RecallAtOnce';
import { SubmissionCharts } from './SubmissionCharts';
import { SubmissionFigures } from './SubmissionFigures';
import { CorrectionNote, SubmissionNotes } from './SubmissionNotes';
import { layoutWords, submissionLine } from './submissionWords';
import { useKeptClaim } from './useKeptClaim';
import { useQueuePlace } from './useQueuePlace';

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
      <RecallAtOnce submission={submission} />
    </>
  );
  const evidence = (
    <>
      <SubmissionCharts submission={submission} />
      <SubmissionFigures submission={submission} />
      {submission.correction && <CorrectionNote correction={submission.correction} />}
      <EffectPanel submission={submission} />
    </>
  );
  useKeptClaim(submission);
  const { toNext, toPrevious, goOn } = useQueuePlace(submission.checkId);
  const [isListingKeys, setIsListingKeys] = useState(false);
  const areKeysOn = useAreKeysOn();
  // The list of keys itself can always be called up, so that they can be switched on again.
  useHotkeys({ '?': () => setIsListingKeys(true), ...(areKeysOn ? { J: toNext, K: toPrevious } : {}) });
  const isTaken = submission.claim?.by === 'other';
  const decision = <DecisionBar submission={submission} isTaken={isTaken} onDecided={goOn} />;
  return (
    <Stack gap="l" style={isPhone && { flexGrow: 1 }}>
      <SubmissionHead
        submission={submission}
        actions={isPhone ? undefined : decision}
        onListKeys={isPhone ? undefined : () => setIsListingKeys(true)}
      />
      <SubmissionNotes submission={submission} />
      {isListingKeys && <KeysDialog onClose={() => setIsListingKeys(false)} />}
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

interface SubmissionHeadProps {
  submission: Submission;
  actions: ReactNode;
  onListKeys?: () => void;
}

function SubmissionHead({ submission, actions, onListKeys }: SubmissionHeadProps) {
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
          {onListKeys && <Button kind="quiet" label="Keys" hotkey="?" onPress={onListKeys} />}
        </Row>
      }
      actions={actions}
    />
  );
}
