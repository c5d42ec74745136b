import { useState } from 'react';

import { Button, Quiet, Toolbar, useHotkeys, useToast } from '@/components/ui';
import { useDecide } from '@/lib/client/moderation';
import type { Submission } from '@/lib/contract/moderation';

import { DecisionDialog } from './DecisionDialog';

/** The three decisions on a submission, each also on its own key. */
export function DecisionBar({ submission }: { submission: Submission }) {
  const { checkId, version, state, isOwn } = submission;
  const [asking, setAsking] = useState<'sendBack' | 'turnAway' | null>(null);
  const decide = useDecide(checkId);
  const toast = useToast();
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
      ? { a: approve, q: () => setAsking('sendBack'), t: () => setAsking('turnAway') }
      : {},
  );

  if (isOwn) return <Quiet>This is your own submission. Another moderator decides on it.</Quiet>;
  if (!canDecide) return null;
  return (
    <>
      <Toolbar label="Decision">
        <Button
          label="Ask the owner"
          hotkey="Q"
          onPress={() => setAsking('sendBack')}
          disabled={decide.isPending}
        />
        <Button
          label="Turn away"
          kind="danger"
          hotkey="T"
          onPress={() => setAsking('turnAway')}
          disabled={decide.isPending}
        />
        <Button label="Approve" kind="primary" hotkey="A" onPress={approve} busy={decide.isPending} />
      </Toolbar>
      {asking && <DecisionDialog action={asking} submission={submission} onClose={() => setAsking(null)} />}
    </>
  );
}
