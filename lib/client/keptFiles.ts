import { queryOptions, useQuery, useQueryClient } from '@tanstack/react-query';

import { forget, keep, readKept } from './deviceStore';

export type KeptFileKind = 'log' | 'photo';

/** Files chosen for a bank's check without a network; they are sent when there is one. */
export const keptFilesQuery = (userId: string, kind: KeptFileKind, bankId: string) =>
  queryOptions({
    queryKey: ['keptFiles', userId, kind, bankId] as const,
    queryFn: async () => (await readKept<File[]>('files', placeOf(userId, kind, bankId))) ?? [],
    staleTime: Infinity,
  });

const placeOf = (userId: string, kind: KeptFileKind, bankId: string) => `${userId}/${kind}/${bankId}`;

/** More than this is not kept: phones give a page little room. */
export const mostKeptBytes = 64 * 1024 * 1024;

/** What is kept for a bank, and keeping and forgetting it. Nothing can be kept while the account is not known. */
export function useKeptFiles(userId: string | undefined, kind: KeptFileKind, bankId: string) {
  const client = useQueryClient();
  const query = keptFilesQuery(userId ?? '', kind, bankId);
  const { data = [] } = useQuery({ ...query, enabled: userId !== undefined });
  return {
    files: data,
    /** @returns whether they are kept */
    async keep(files: File[]): Promise<boolean> {
      const bytes = files.reduce((sum, { size }) => sum + size, 0);
      if (userId === undefined || bytes > mostKeptBytes) return false;
      const isKept = await keep('files', placeOf(userId, kind, bankId), files);
      if (isKept) client.setQueryData(query.queryKey, files);
      return isKept;
    },
    async forget(): Promise<void> {
      client.setQueryData(query.queryKey, []);
      if (userId !== undefined) await forget('files', placeOf(userId, kind, bankId));
    },
  };
}

/** The same outside of a component. */
export async function takeKeptFiles(userId: string, kind: KeptFileKind, bankId: string): Promise<File[]> {
  return (await readKept<File[]>('files', placeOf(userId, kind, bankId))) ?? [];
}

export const forgetKeptFiles = (userId: string, kind: KeptFileKind, bankId: string) =>
  forget('files', placeOf(userId, kind, bankId));
