import { useState } from 'react';

import { useLayout } from '@/components/theme';
import {
  ActionBar,
  Button,
  Disclosure,
  Quiet,
  Row,
  Stack,
  Toolbar,
  useHotkeys,
  useToast,
} from '@/components/ui';
import { useDecide } from '@/lib/client/moderation';
import type { DecisionRequest, DecisionResult, Submission } from '@/lib/contract/moderation';
import { formatQuantity } from '@/lib/units';

import { DecisionDialog } from './DecisionDialog';
import { type AskedAction, decisionWords } from './decisionWords';
import { proposedCapacityAh, proposalFinding } from './submissionWords';
import { useAreKeysOn } from './keys';

interface DecisionBarProps {
  submission: Submission;
  /** Another moderator is at work on it. */
  isTaken: boolean;
  onDecided: () => void;
}

/** The decisions on a check: the usual three each on its own key, the rest behind "More". */
export function DecisionBar({ submission, isTaken, onDecided }: DecisionBarProps) {
  const { checkId, state, isOwn, bank, history, isRealFailure } = submission;
  const [asking, setAsking] = useState<AskedAction | null>(null);
  const decide = useDecide(checkId, onDecided);
  const toast = useToast();
  const { isPhone } = useLayout();
  const areKeysOn = useAreKeysOn();
  const isOpen = state === 'submitted' || state === 'sentBack';
  const canDecide = isOpen && !isOwn && !isTaken;
  const quick = quickApproval(submission);

  const approve = () =>
    decide.mutate(
      { decision: quick.decision, what: `Bank ${bank.pseudonym}: ${quick.done}` },
      { onError: (error) => toast({ text: error.message }) },
    );
  const finish = ({ isProposed }: DecisionResult) => {
    setAsking(null);
    if (isProposed) toast({ text: 'Proposed. Another moderator has to agree.' });
    onDecided();
  };
  useHotkeys(
    canDecide && areKeysOn && asking === null && !decide.isPending
      ? { A: approve, Q: () => setAsking('sendBack'), T: () => setAsking('turnAway') }
      : {},
  );

  if (isOwn) return <Quiet>This is your own submission. Another moderator decides on it.</Quiet>;
  const more: AskedAction[] = isOpen
    ? ['correct', 'realFailure', ...(history.length > 1 ? (['merge'] as const) : [])]
    : state === 'approved'
      ? [
          'recall',
          ...(isRealFailure ? [] : (['realFailure'] as const)),
          ...(history.length > 1 ? (['merge'] as const) : []),
        ]
      : [];
  if (isTaken || more.length === 0) return null;
  // A phone has no keys to hint at.
  const hint = (key: string) => (isPhone || !areKeysOn ? undefined : key);
  const isBusy = decide.isPending;
  const ask = (action: AskedAction, key?: string) => (
    <Button
      key={action}
      label={decisionWords[action].title}
      kind={action === 'turnAway' || action === 'recall' ? 'danger' : 'secondary'}
      hotkey={key && hint(key)}
      onPress={() => setAsking(action)}
      disabled={isBusy}
    />
  );
  const approveButton = canDecide && (
    <Button
      label={quick.label}
      kind="primary"
      hotkey={hint('A')}
      onPress={approve}
      busy={isBusy}
      wide={isPhone}
    />
  );
  const usual = canDecide && (
    <>
      {ask('sendBack', 'Q')}
      {ask('turnAway', 'T')}
    </>
  );
  const moreDecisions = (
    <Disclosure label="More decisions">
      <Row gap="s">{more.map((action) => ask(action))}</Row>
    </Disclosure>
  );
  return (
    <>
      {isPhone ? (
        <>
          {moreDecisions}
          {canDecide && (
            <ActionBar stays>
              {approveButton}
              <Row gap="s">{usual}</Row>
            </ActionBar>
          )}
        </>
      ) : (
        <Stack gap="s">
          {canDecide && (
            <Toolbar label="Decision">
              {usual}
              {approveButton}
            </Toolbar>
          )}
          {moreDecisions}
        </Stack>
      )}
      {asking && (
        <DecisionDialog
          action={asking}
          submission={submission}
          onClose={() => setAsking(null)}
          onDone={finish}
        />
      )}
    </>
  );
}

/** What the key A does: approves, or approves as the figure was likely meant. */
function quickApproval(submission: Submission): { label: string; done: string; decision: DecisionRequest } {
  const { version } = submission;
  const capacityAh = proposedCapacityAh(submission);
  if (capacityAh === undefined)
    return { label: 'Approve', done: 'approved', decision: { action: 'approve', version } };
  const as = formatQuantity(capacityAh, 'Ah', { significant: 4 });
  return {
    label: `Approve as ${as}`,
    done: `approved as ${as}`,
    decision: {
      action: 'correct',
      version,
      corrections: { capacityAh },
      reason: proposalFinding(submission)?.text ?? `Likely meant: ${as}.`,
    },
  };
}
