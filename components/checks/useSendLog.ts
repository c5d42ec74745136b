import { useEffect, useRef, useState } from 'react';

import { ApiError } from '@/lib/client/http';
import { useKeptFiles } from '@/lib/client/keptFiles';
import { useSession } from '@/lib/client/session';
import { useUploadLog } from '@/lib/client/uploads';
import { limits } from '@/lib/contract/limits';

import { fileSize } from './fileSize';
import { useWhenOnline } from './useWhenOnline';

/** What is wrong with files before they are sent anywhere. */
function problemOf(files: readonly File[]): string | undefined {
  if (files.length > limits.logFiles.max)
    return `These are ${files.length} files; at most ${limits.logFiles.max} can be read as one log.`;
  for (const { name, size } of files) {
    if (size === 0) return `${name} is empty.`;
    if (size > limits.logBytes.max)
      return `${name} has ${fileSize(size)}; at most ${fileSize(limits.logBytes.max)} can be read. Log in longer steps, or cut it to the test.`;
  }
  return undefined;
}

/** What files are called together. */
export const nameOf = ([first, ...others]: readonly File[]) =>
  others.length === 0 ? (first?.name ?? '') : `${others.length + 1} files`;

export const bytesOf = (files: readonly File[]) => files.reduce((sum, { size }) => sum + size, 0);

/** Sends the files of a log and tells how far they have come; without a network they are kept, and sent when there is one. */
export function useSendLog(bankId: string, onStored: (uploadId: string) => void) {
  const uploadLog = useUploadLog(bankId);
  const { user } = useSession();
  const kept = useKeptFiles(user?.id, 'log', bankId);
  const [files, setFiles] = useState<readonly File[]>([]);
  const [refusal, setRefusal] = useState<string | undefined>(undefined);
  const [sent, setSent] = useState(0);
  const sending = useRef<AbortController>(undefined);
  useEffect(() => () => sending.current?.abort(), []);

  const send = (next: readonly File[]) => {
    const problem = problemOf(next);
    setRefusal(problem);
    setFiles(problem ? [] : next);
    if (problem) return;
    setSent(0);
    const controller = new AbortController();
    sending.current = controller;
    uploadLog.mutate(
      { files: next, onProgress: setSent, signal: controller.signal },
      {
        onSuccess: ({ id }) => {
          void kept.forget();
          onStored(id);
        },
        onError: (error) => {
          if (controller.signal.aborted) return setRefusal(undefined);
          const isOffline = error instanceof ApiError && error.code === 'offline';
          if (!isOffline) void kept.forget();
          void (isOffline ? kept.keep([...next]) : Promise.resolve(false)).then((isKept) =>
            setRefusal(isKept ? undefined : sentence(error)),
          );
        },
      },
    );
  };

  const isSending = uploadLog.isPending;
  useWhenOnline(kept.files.length > 0 && !isSending, () => send(kept.files));
  return {
    files,
    sent,
    refusal,
    isSending,
    send,
    stop: () => sending.current?.abort(),
    /** Wait on the device for a network. */
    keptFiles: isSending ? [] : kept.files,
    forgetKept: () => void kept.forget(),
  };
}

const sentence = (error: Error) =>
  error instanceof ApiError ? (error.fields.file ?? error.message) : 'The file could not be sent. Try again.';
