import { useState } from 'react';

import { useAccountForm } from '@/components/account/useAccountForm';
import { BoundTextArea, Form, FormError, SubmitButton } from '@/components/forms';
import { Button, Dialog, Row, Text, useToast } from '@/components/ui';
import { useSession } from '@/lib/client/session';
import { useRecallAtOnce } from '@/lib/client/steward';
import type { Submission } from '@/lib/contract/moderation';
import { recallAtOnceRequestSchema } from '@/lib/contract/steward';

/** For stewards: takes a check out of the public figures now, instead of with the changes of other owners. */
export function RecallAtOnce({ submission }: { submission: Submission }) {
  const { user } = useSession();
  const [isAsking, setIsAsking] = useState(false);
  const { state, isOwn } = submission;
  const canRecall = user?.role === 'steward' && !isOwn && (state === 'approved' || state === 'recalled');
  if (!canRecall) return null;
  return (
    <Row>
      <Button kind="danger" label="Recall at once" onPress={() => setIsAsking(true)} />
      {isAsking && <RecallDialog submission={submission} onClose={() => setIsAsking(false)} />}
    </Row>
  );
}

function RecallDialog({ submission, onClose }: { submission: Submission; onClose: () => void }) {
  const toast = useToast();
  const recall = useRecallAtOnce(submission.checkId);
  const { control, submit } = useAccountForm(
    recallAtOnceRequestSchema,
    { version: submission.version, reason: '' },
    async (request) => {
      const { wasPublic } = await recall.mutateAsync(request);
      toast({
        text: wasPublic
          ? 'Recalled. The public figures move with the refit.'
          : 'Recalled. It was not public.',
      });
    },
    onClose,
  );
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Recall this check at once?"
      actions={
        <>
          <Button label="Leave it as it is" onPress={onClose} />
          <SubmitButton kind="danger" control={control} label="Recall at once" onPress={submit} />
        </>
      }
    >
      <Form label="Recall at once" onSubmit={submit}>
        <Text>
          Usually a change goes public together with those of four other owners, so that nobody can tell whose
          it was. At once, the public figures move by this check alone, and whoever compares them can tell
          what it said. It can’t be undone. The reason is recorded, and goes to the owner where the check
          still counted.
        </Text>
        <BoundTextArea control={control} name="reason" label="Reason" lines={3} maxLength={1000} />
        <FormError control={control} title="It was not recalled" />
      </Form>
    </Dialog>
  );
}
