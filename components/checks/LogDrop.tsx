import { Banner, Button, FileDrop, Stack } from '@/components/ui';
import { limits } from '@/lib/contract/limits';

import { fileSize } from './fileSize';
import { bytesOf, nameOf, useSendLog } from './useSendLog';

/** Takes the files of a log and sends them, telling how far they have come. */
export function LogDrop({ bankId, onStored }: { bankId: string; onStored: (uploadId: string) => void }) {
  const { files, sent, refusal, isSending, send, stop, keptFiles, forgetKept } = useSendLog(bankId, onStored);
  const name = nameOf(files);
  const bytes = bytesOf(files);
  return (
    <Stack gap="s">
      {keptFiles.length > 0 && (
        <Banner
          kind="info"
          title="No connection"
          actions={
            <>
              <Button label="Try to send it now" onPress={() => send(keptFiles)} />
              <Button kind="quiet" label="Forget it" onPress={forgetKept} />
            </>
          }
        >
          {`${nameOf(keptFiles)}, ${fileSize(bytesOf(keptFiles))}, is kept on this device and sent when there is a connection; a log is read on the server. Without one you can go on with typed figures.`}
        </Banner>
      )}
      <FileDrop
        label="The log of the test"
        hint={`CSV up to 64 MB and 1,000,000 rows: time, voltage, current. A log split in up to ${limits.logFiles.max} files: choose them together.`}
        accept=".csv,.txt,.tsv,.log,text/csv,text/plain"
        onFiles={send}
        error={refusal}
        progress={
          isSending && files.length > 0
            ? {
                label: `Sending ${name}`,
                fraction: sent,
                detail: `${fileSize(sent * bytes)} of ${fileSize(bytes)}`,
                onCancel: stop,
              }
            : undefined
        }
      />
      {refusal && files.length > 0 && !isSending && (
        <Button label={`Send ${name} again`} onPress={() => send(files)} />
      )}
    </Stack>
  );
}
