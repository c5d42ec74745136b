import { Banner, Button, Dialog, Stack, Text, useToast } from '@/components/ui';
import { useRevokeRecord } from '@/lib/client/records';
import type { HealthRecord } from '@/lib/contract/records';

interface WithdrawRecordDialogProps {
  bankId: string;
  record: HealthRecord;
  /** The day it was issued, in words. */
  issued: string;
  onClose: () => void;
}

/** Asks before a record is withdrawn, which can't be taken back. */
export function WithdrawRecordDialog({ bankId, record, issued, onClose }: WithdrawRecordDialogProps) {
  const toast = useToast();
  const { mutate, isPending, error } = useRevokeRecord(bankId);
  const withdraw = () =>
    mutate(record.id, {
      onSuccess() {
        toast({ text: 'Withdrawn. Its link says so now.' });
        onClose();
      },
    });
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Withdraw this health record?"
      actions={
        <>
          <Button label="Leave it in force" onPress={onClose} />
          <Button kind="danger" label="Withdraw it" busy={isPending} onPress={withdraw} />
        </>
      }
    >
      <Stack gap="m">
        <Text>
          {`The link of the record of ${issued} will say that it was withdrawn, and nothing else. Printed copies stay as they are; whoever looks at the link sees that they no longer stand. It can't be taken back; you can issue another.`}
        </Text>
        {error && (
          <Banner kind="error" title="It was not withdrawn">
            {error.message}
          </Banner>
        )}
      </Stack>
    </Dialog>
  );
}
