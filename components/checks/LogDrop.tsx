import { useEffect, useRef, useState } from 'react';

import { Button, FileDrop, Stack } from '@/components/ui';
import { ApiError } from '@/lib/client/http';
import { useUploadLog } from '@/lib/client/uploads';
import { limits } from '@/lib/contract/limits';

import { fileSize } from './fileSize';

/** What is wrong with a file before it is sent anywhere. */
function problemOf(file: File): string | undefined {
  if (file.size === 0) return `${file.name} is empty.`;
  if (file.size > limits.logBytes.max)
    return `${file.name} has ${fileSize(file.size)}; at most ${fileSize(limits.logBytes.max)} can be read. Log in longer steps, or cut it to the test.`;
  return undefined;
}

/** Takes the file of a log and sends it, telling how far it has come. */
export function LogDrop({ bankId, onStored }: { bankId: string; onStored: (uploadId: string) => void }) {
  const uploadLog = useUploadLog(bankId);
  const [file, setFile] = useState<File | null>(null);
  const [refusal, setRefusal] = useState<string | undefined>(undefined);
  const [sent, setSent] = useState(0);
  const sending = useRef<AbortController>(undefined);
  useEffect(() => () => sending.current?.abort(), []);

  const send = (next: File) => {
    const problem = problemOf(next);
    setRefusal(problem);
    setFile(problem ? null : next);
    if (problem) return;
    setSent(0);
    const controller = new AbortController();
    sending.current = controller;
    uploadLog.mutate(
      { file: next, onProgress: setSent, signal: controller.signal },
      {
        onSuccess: ({ id }) => onStored(id),
        onError: (error) => setRefusal(controller.signal.aborted ? undefined : sentence(error)),
      },
    );
  };

  return (
    <Stack gap="s">
      <FileDrop
        label="The log of the test"
        hint="CSV up to 64 MB and 1,000,000 rows: time, voltage, current."
        accept=".csv,.txt,.tsv,.log,text/csv,text/plain"
        onFile={send}
        error={refusal}
        progress={
          uploadLog.isPending && file
            ? {
                label: `Sending ${file.name}`,
                fraction: sent,
                detail: `${fileSize(sent * file.size)} of ${fileSize(file.size)}`,
                onCancel: () => sending.current?.abort(),
              }
            : undefined
        }
      />
      {refusal && file && !uploadLog.isPending && (
        <Button label={`Send ${file.name} again`} onPress={() => send(file)} />
      )}
    </Stack>
  );
}

const sentence = (error: Error) =>
  error instanceof ApiError ? (error.fields.file ?? error.message) : 'The file could not be sent. Try again.';
