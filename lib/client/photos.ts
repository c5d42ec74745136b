import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';
import { z } from 'zod';

import { photoSchema } from '@/lib/contract/uploads';

import { apiRequest, readFile, uploadFile } from './http';

const photosKey = ['photos'] as const;

/** A photo as a `data:` address, whole or small. It never changes. */
export const photoQuery = (photoId: string, size: 'full' | 'thumb') =>
  queryOptions({
    queryKey: [...photosKey, photoId, size] as const,
    queryFn: async () =>
      dataAddressOf(await readFile(`/api/photos/${photoId}${size === 'thumb' ? '/thumb' : ''}`)),
    staleTime: Infinity,
  });

function dataAddressOf(blob: Blob): Promise<string> {
  return new Promise((resolve, reject) => {
    const reader = new FileReader();
    reader.onload = () => resolve(String(reader.result));
    reader.onerror = () => reject(reader.error);
    reader.readAsDataURL(blob);
  });
}

interface PhotoToSend {
  file: File;
  /** The share sent so far, 0..1. */
  onProgress?: (fraction: number) => void;
  signal?: AbortSignal;
}

/** Sends a photo of a bank's meter. */
export function useUploadPhoto(bankId: string) {
  return useMutation({
    mutationFn: ({ file, onProgress, signal }: PhotoToSend) =>
      uploadFile(photoSchema, `/api/banks/${bankId}/photos`, file, { onProgress, signal }),
  });
}

/** Removes a photo, unless a check was sent in with it. Removes: both of its sizes. */
export function useRemovePhoto() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (photoId: string) => apiRequest(z.object({}), `/api/photos/${photoId}`, { method: 'DELETE' }),
    onSuccess: (_answer, photoId) => client.removeQueries({ queryKey: [...photosKey, photoId] }),
  });
}
