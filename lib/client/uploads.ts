import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import { type LogMapping, type Upload, uploadSchema } from '@/lib/contract/uploads';

import { apiRequest, uploadFile } from './http';

const pollMs = 700;

/** Whether the server still has work to do on it. */
export const isBeingRead = ({ state }: Pick<Upload, 'state'>) => state === 'received' || state === 'working';

/** An upload; asked for again and again while the server reads it. */
export const uploadQuery = (uploadId: string) =>
  queryOptions({
    queryKey: ['uploads', uploadId] as const,
    queryFn: ({ signal }) => apiRequest(uploadSchema, `/api/uploads/${uploadId}`, { signal }),
    refetchInterval: ({ state: { data } }) => (data && isBeingRead(data) ? pollMs : false),
  });

interface LogToSend {
  /** The log, or the files it was split into. */
  files: readonly File[];
  /** The share sent so far, 0..1. */
  onProgress?: (fraction: number) => void;
  signal?: AbortSignal;
}

/** Sends a log. Sets: its upload. */
export function useUploadLog(bankId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ files, onProgress, signal }: LogToSend) =>
      uploadFile(uploadSchema, `/api/banks/${bankId}/logs`, files, { onProgress, signal }),
    onSuccess: (upload) => client.setQueryData(uploadQuery(upload.id).queryKey, upload),
  });
}

/** Has a log read again as its owner says. Sets: its upload. */
export function useRemapLog(uploadId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (mapping: LogMapping) =>
      apiRequest(uploadSchema, `/api/uploads/${uploadId}/mapping`, { method: 'PUT', body: { mapping } }),
    onSuccess: (upload) => client.setQueryData(uploadQuery(uploadId).queryKey, upload),
  });
}
