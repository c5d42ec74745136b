import { useState } from 'react';

import { Banner, Button, Dialog, Quiet, Stack, TextArea, useToast } from '@/components/ui';
import { ApiError } from '@/lib/client/http';
import { useDecide } from '@/lib/client/moderation';
import { limits } from '@/lib/contract/limits';
import type { Submission } from '@/lib/contract/moderation';

const words = {
  sendBack: {
    title: 'Ask the owner',
    label: 'Question',
    hint: 'The owner gets it by e-mail and can answer or correct the figures.',
    button: 'Send back',
    done: 'Sent back with your question.',
    field: 'question',
  },
  turnAway: {
    title: 'Turn away',
    label: 'Reason',
    hint: 'The owner gets it by e-mail. Real failures are not turned away: they count.',
    button: 'Turn away',
    done: 'Turned away with your reason.',
    field: 'reason',
  },
} as const;

interface DecisionDialogProps {
  action: 'sendBack' | 'turnAway';
  submission: Submission;
  onClose: () => void;
}

/** Asks for the words that go with sending back or turning away; nothing typed is lost when it fails. */
export function DecisionDialog({
  action,
  submission: { checkId, version, findings },
  onClose,
}: DecisionDialogProps) {
  const { title, label, hint, button, done, field } = words[action];
  const [text, setText] = useState('');
  const decide = useDecide(checkId);
  const toast = useToast();
  const fieldError = decide.error instanceof ApiError ? decide.error.fields[field] : undefined;

  const send = () =>
    decide.mutate(
      action === 'sendBack' ? { action, version, question: text } : { action, version, reason: text },
      {
        onSuccess: () => {
          toast({ text: done });
          onClose();
        },
      },
    );

  return (
    <Dialog
      isOpen
      onClose={onClose}
      title={title}
      actions={
        <>
          <Button label="Keep it open" onPress={onClose} />
          <Button
            label={button}
            kind={action === 'turnAway' ? 'danger' : 'primary'}
            onPress={send}
            busy={decide.isPending}
          />
        </>
      }
    >
      <Stack gap="m">
        <TextArea
          label={label}
          hint={hint}
          value={text}
          onChange={setText}
          error={fieldError}
          maxLength={limits.noteLength.max}
          lines={5}
        />
        {findings.some(({ severity }) => severity !== 'fits') && (
          <Quiet>{`Found: ${findings
            .filter(({ severity }) => severity !== 'fits')
            .map((finding) => finding.title.toLowerCase())
            .join(', ')}.`}</Quiet>
        )}
        {decide.isError && !fieldError && <Banner kind="error">{decide.error.message}</Banner>}
      </Stack>
    </Dialog>
  );
}
