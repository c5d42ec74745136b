import { useState } from 'react';

import { Banner, Button, DefinitionList, Dialog, Stack, Text, TextArea, useToast } from '@/components/ui';
import { useObjectToCorrection } from '@/lib/client/checks';
import { ApiError } from '@/lib/client/http';
import type { Check, Correction } from '@/lib/contract/checks';
import { limits } from '@/lib/contract/limits';

import { correctionItems } from './correctionWords';

/** What a moderator corrected, beside the owner's own figures, and the way to object. */
export function CorrectionPart({ check, correction }: { check: Check; correction: Correction }) {
  const [isAsking, setIsAsking] = useState(false);
  return (
    <Banner
      kind="info"
      title="Approved with a correction"
      actions={check.state === 'approved' && <Button label="Object" onPress={() => setIsAsking(true)} />}
    >
      <Stack gap="s">
        <DefinitionList items={correctionItems(correction)} />
        <Text>{correction.reason}</Text>
      </Stack>
      {isAsking && <ObjectionDialog check={check} onClose={() => setIsAsking(false)} />}
    </Banner>
  );
}

function ObjectionDialog({ check, onClose }: { check: Check; onClose: () => void }) {
  const object = useObjectToCorrection(check.id);
  const toast = useToast();
  const [reason, setReason] = useState('');
  const fieldError = object.error instanceof ApiError ? object.error.fields.reason : undefined;
  const send = () =>
    object.mutate(
      { version: check.version, reason },
      {
        onSuccess: () => {
          toast({ text: 'The check is with the moderators again, as you gave it.' });
          onClose();
        },
      },
    );
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Object to the correction"
      actions={
        <>
          <Button label="Keep the correction" onPress={onClose} />
          <Button kind="primary" label="Object" onPress={send} busy={object.isPending} />
        </>
      }
    >
      <Stack gap="m">
        <TextArea
          label="Why your figure is right"
          hint="The check leaves the pool and goes back to the moderators with the figures as you gave them."
          value={reason}
          onChange={setReason}
          error={fieldError}
          maxLength={limits.noteLength.max}
          lines={4}
        />
        {object.isError && !fieldError && <Banner kind="error">{object.error.message}</Banner>}
      </Stack>
    </Dialog>
  );
}
