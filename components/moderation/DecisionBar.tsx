import { useState } from 'react';

import { useLayout } from '@/components/theme';
import { ActionBar, Button, Quiet, Row, Toolbar, useHotkeys, useToast } from '@/components/ui';
import { useDecide } from '@/lib/client/moderation';
import type { Submission } from '@/lib/contract/moderation';

import { DecisionDialog } from './DecisionDialog';

/** The three decisions on a submission, each also on its own key. */
export function DecisionBar({ submission }: { submission: Submission }) {
  const { checkId, version, state, isOwn } = submission;
  const [asking, setAsking] = useState<'sendBack' | 'turnAway' | null>(null);
  const decide = useDecide(checkId);
  const toast = useToast();
  const { isPhone } = useLayout();
  const canDecide = state === 'submitted' && !isOwn;

  const approve = () =>
    decide.mutate(
      { action: 'approve', version },
      {
        onSuccess: () => toast({ text: 'Approved. The working fit is being made anew.' }),
        onError: (error) => toast({ text: error.message }),
      },
    );
  useHotkeys(
    canDecide && asking === null && !decide.isPending
      ? { A: approve, Q: () => setAsking('sendBack'), T: () => setAsking('turnAway') }
      : {},
  );

  if (isOwn) return <Quiet>This is your own submission. Another moderator decides on it.</Quiet>;
  if (!canDecide) return null;
  // A phone has no keys to hint at.
  const hint = (key: string) => (isPhone ? undefined : key);
  const isBusy = decide.isPending;
  const approveButton = (
    <Button
      label="Approve"
      kind="primary"
      hotkey={hint('A')}
      onPress={approve}
      busy={isBusy}
      wide={isPhone}
    />
  );
  const others = (
    <>
      <Button
        label="Ask the owner"
        hotkey={hint('Q')}
        onPress={() => setAsking('sendBack')}
        disabled={isBusy}
      />
      <Button
        label="Turn away"
        kind="danger"
        hotkey={hint('T')}
        onPress={() => setAsking('turnAway')}
        disabled={isBusy}
      />
    </>
  );
  return (
    <>
      {isPhone ? (
        <ActionBar>
          {approveButton}
          <Row gap="s">{others}</Row>
        </ActionBar>
      ) : (
        <Toolbar label="Decision">
          {others}
          {approveButton}
        </Toolbar>
      )}
      {asking && <DecisionDialog action={asking} submission={submission} onClose={() => setAsking(null)} />}
    </>
  );
}
