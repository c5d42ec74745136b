import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import {
  healthRecordListSchema,
  healthRecordSchema,
  issuedRecordSchema,
  sharedRecordSchema,
} from '@/lib/contract/records';

import { banksKey } from './banks';
import { apiRequest } from './http';

/** The health records issued of a bank, the newest first. */
export const recordsQuery = (bankId: string) =>
  queryOptions({
    queryKey: [...banksKey, bankId, 'records'] as const,
    queryFn: async ({ signal }) =>
      (await apiRequest(healthRecordListSchema, `/api/banks/${bankId}/records`, { signal })).records,
  });

/** What stands behind the link of a health record, for anyone. */
export const sharedRecordQuery = (token: string) =>
  queryOptions({
    queryKey: ['sharedRecords', token] as const,
    queryFn: ({ signal }) =>
      apiRequest(sharedRecordSchema, `/api/records/${encodeURIComponent(token)}`, { signal }),
    // It may have been withdrawn since.
    staleTime: 0,
  });

/** The answer holds the link's token, which is told only now. Invalidates: the bank's records. */
export function useIssueRecord(bankId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () =>
      apiRequest(issuedRecordSchema, `/api/banks/${bankId}/records`, { method: 'POST', body: {} }),
    onSuccess: () => client.invalidateQueries({ queryKey: recordsQuery(bankId).queryKey }),
  });
}

/** Invalidates: the bank's records, what stands behind links. */
export function useRevokeRecord(bankId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (recordId: string) =>
      apiRequest(healthRecordSchema, `/api/records/${recordId}/revoke`, { method: 'POST', body: {} }),
    onSuccess: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: recordsQuery(bankId).queryKey }),
        client.invalidateQueries({ queryKey: ['sharedRecords'] }),
      ]),
  });
}
