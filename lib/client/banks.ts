import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import {
  type BankEventInput,
  type BankInput,
  bankListSchema,
  bankSchema,
  type CellTypeChoice,
  cellTypeChoiceSchema,
  cellTypeListSchema,
  type UpdateBankRequest,
} from '@/lib/contract/banks';
import type { CellTypeProposalInput } from '@/lib/contract/proposals';

import { apiRequest } from './http';

/** Everything of banks, their lists of checks included, lies under this key. */
export const banksKey = ['banks'] as const;
/** Single checks, which are computed anew when their bank changes. */
export const checksKey = ['checks'] as const;

/** The signed-in owner's banks. */
export const banksQuery = queryOptions({
  queryKey: banksKey,
  queryFn: async ({ signal }) => (await apiRequest(bankListSchema, '/api/banks', { signal })).banks,
});

export const bankQuery = (bankId: string) =>
  queryOptions({
    queryKey: [...banksKey, bankId] as const,
    queryFn: ({ signal }) => apiRequest(bankSchema, `/api/banks/${bankId}`, { signal }),
  });

/** The cell types a bank can be of, by maker and name; one's own proposals among them. */
export const cellTypesQuery = queryOptions({
  queryKey: ['cellTypes'] as const,
  queryFn: async ({ signal }) =>
    (await apiRequest(cellTypeListSchema, '/api/cell-types', { signal })).cellTypes,
  staleTime: 60 * 60_000,
});

/** Invalidates: cell types. What was proposed can be chosen at once. */
export function useProposeCellType() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (proposal: CellTypeProposalInput) =>
      apiRequest(cellTypeChoiceSchema, '/api/cell-types', { method: 'POST', body: proposal }),
    onSuccess: (proposed) => {
      client.setQueryData(cellTypesQuery.queryKey, (known: CellTypeChoice[] | undefined) => [
        ...(known ?? []),
        proposed,
      ]);
      void client.invalidateQueries({ queryKey: cellTypesQuery.queryKey });
    },
  });
}

/** Invalidates: banks. */
export function useCreateBank() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (bank: BankInput) => apiRequest(bankSchema, '/api/banks', { method: 'POST', body: bank }),
    // The list too where it is not shown, so that the device keeps the new one.
    onSuccess: () => client.invalidateQueries({ queryKey: banksKey, refetchType: 'all' }),
  });
}

/** Invalidates: banks, single checks. */
export function useUpdateBank(bankId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (bank: UpdateBankRequest) =>
      apiRequest(bankSchema, `/api/banks/${bankId}`, { method: 'PUT', body: bank }),
    onSuccess: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: banksKey }),
        client.invalidateQueries({ queryKey: checksKey }),
      ]),
  });
}

/** Invalidates: banks, single checks. */
export function useAddBankEvent(bankId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (event: BankEventInput) =>
      apiRequest(bankSchema, `/api/banks/${bankId}/events`, { method: 'POST', body: event }),
    onSuccess: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: banksKey }),
        client.invalidateQueries({ queryKey: checksKey }),
      ]),
  });
}
