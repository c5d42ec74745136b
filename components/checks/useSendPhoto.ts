import { useEffect, useRef, useState } from 'react';

import { ApiError } from '@/lib/client/http';
import { useKeptFiles } from '@/lib/client/keptFiles';
import { useUploadPhoto } from '@/lib/client/photos';
import { useSession } from '@/lib/client/session';
import { limits } from '@/lib/contract/limits';

import { fileSize } from './fileSize';
import { useWhenOnline } from './useWhenOnline';

/** What is wrong with a picture before it is sent anywhere. */
function photoProblemOf({ name, size, type }: Pick<File, 'name' | 'size' | 'type'>): string | undefined {
  if (size === 0) return `${name} is empty.`;
  if (size > limits.photoBytes.max)
    return `${name} has ${fileSize(size)}; at most ${fileSize(limits.photoBytes.max)} can be sent.`;
  if (type !== '' && !type.startsWith('image/')) return `${name} is not a picture.`;
  return undefined;
}

interface Problem {
  text: string;
  /** Sending the same file again would change nothing. */
  isOfFile: boolean;
}

/**
 * Sends a photo and tells how far it has come, and what was wrong. Without a network it is kept on the device, and sent
 * when there is one, here or with its check.
 */
export function useSendPhoto(bankId: string, onStored: (photoId: string) => void) {
  const uploadPhoto = useUploadPhoto(bankId);
  const [file, setFile] = useState<File | null>(null);
  const [problem, setProblem] = useState<Problem | undefined>(undefined);
  const [sent, setSent] = useState(0);
  const { user } = useSession();
  const kept = useKeptFiles(user?.id, 'photo', bankId);
  const [keptPhoto] = kept.files;
  const sending = useRef<AbortController>(undefined);
  useEffect(() => () => sending.current?.abort(), []);

  const send = (next: File) => {
    const refusal = photoProblemOf(next);
    setProblem(refusal === undefined ? undefined : { text: refusal, isOfFile: true });
    setFile(refusal ? null : next);
    if (refusal) return;
    setSent(0);
    const controller = new AbortController();
    sending.current = controller;
    uploadPhoto.mutate(
      { file: next, onProgress: setSent, signal: controller.signal },
      {
        onSuccess: ({ id }) => {
          void kept.forget();
          onStored(id);
        },
        onError: (error) => {
          if (controller.signal.aborted) return setProblem(undefined);
          const isOffline = error instanceof ApiError && error.code === 'offline';
          if (!isOffline) void kept.forget();
          void (isOffline ? kept.keep([next]) : Promise.resolve(false)).then((isKept) =>
            setProblem(isKept ? undefined : problemOf(error)),
          );
        },
      },
    );
  };

  useWhenOnline(keptPhoto !== undefined && !uploadPhoto.isPending, () => keptPhoto && send(keptPhoto));
  const stop = () => sending.current?.abort();
  return {
    file,
    sent,
    problem,
    isSending: uploadPhoto.isPending,
    send,
    stop,
    /** Waits on the device for a network; undefined for none. */
    keptPhoto: uploadPhoto.isPending ? undefined : keptPhoto,
    forgetKept: () => void kept.forget(),
  };
}

function problemOf(error: Error): Problem {
  if (!(error instanceof ApiError))
    return { text: 'The picture could not be sent. Try again.', isOfFile: false };
  const { file } = error.fields;
  return { text: file ?? error.message, isOfFile: file !== undefined };
}
