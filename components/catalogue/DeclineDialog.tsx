import { useState } from 'react';

import { Banner, Button, Dialog, Stack, TextArea, useToast } from '@/components/ui';
import { useDeclineCellType } from '@/lib/client/catalogue';
import { ApiError } from '@/lib/client/http';
import type { CataloguePage } from '@/lib/contract/catalogue';
import { limits } from '@/lib/contract/limits';

/** Declines a proposal with a reason, which its proposer gets. */
export function DeclineDialog({ entry, onClose }: { entry: CataloguePage; onClose: () => void }) {
  const [reason, setReason] = useState('');
  const decline = useDeclineCellType(entry.id);
  const toast = useToast();
  const problem = decline.error instanceof ApiError ? decline.error.fields.reason : undefined;
  const send = () =>
    decline.mutate(
      { version: entry.version, reason },
      {
        onSuccess: () => {
          toast({ text: 'Declined. Its proposer gets the reason.' });
          onClose();
        },
      },
    );
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Decline the proposal"
      actions={
        <>
          <Button label="Keep it open" onPress={onClose} />
          <Button label="Decline" kind="danger" onPress={send} busy={decline.isPending} />
        </>
      }
    >
      <Stack gap="m">
        <TextArea
          label="Reason"
          hint="Its proposer gets these words by mail."
          value={reason}
          onChange={setReason}
          error={problem}
          maxLength={limits.noteLength.max}
          lines={4}
        />
        {decline.isError && !problem && <Banner kind="error">{decline.error.message}</Banner>}
      </Stack>
    </Dialog>
  );
}
