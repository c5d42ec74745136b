import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import {
  type CheckInput,
  checkListSchema,
  checkSchema,
  type ResubmitCheckRequest,
} from '@/lib/contract/checks';

import { banksKey, checksKey } from './banks';
import { apiRequest } from './http';

/** A bank's checks in order of their day. */
export const bankChecksQuery = (bankId: string) =>
  queryOptions({
    queryKey: [...banksKey, bankId, 'checks'] as const,
    queryFn: async ({ signal }) =>
      (await apiRequest(checkListSchema, `/api/banks/${bankId}/checks`, { signal })).checks,
  });

export const checkQuery = (checkId: string) =>
  queryOptions({
    queryKey: [...checksKey, checkId] as const,
    queryFn: ({ signal }) => apiRequest(checkSchema, `/api/checks/${checkId}`, { signal }),
  });

/** Each change of a check can change the findings of the bank's other ones. */
function useInvalidateChecks() {
  const client = useQueryClient();
  return () =>
    Promise.all([
      client.invalidateQueries({ queryKey: banksKey }),
      client.invalidateQueries({ queryKey: checksKey }),
    ]);
}

/** Safe to repeat under the same `idempotencyKey`. Invalidates: banks (with their checks), single checks. */
export function useSubmitCheck(bankId: string) {
  return useMutation({
    mutationFn: (check: CheckInput) =>
      apiRequest(checkSchema, `/api/banks/${bankId}/checks`, { method: 'POST', body: check }),
    onSuccess: useInvalidateChecks(),
  });
}

/** Invalidates: banks (with their checks), single checks. */
export function useResubmitCheck(checkId: string) {
  return useMutation({
    mutationFn: (check: ResubmitCheckRequest) =>
      apiRequest(checkSchema, `/api/checks/${checkId}`, { method: 'PUT', body: check }),
    onSuccess: useInvalidateChecks(),
  });
}

/** Invalidates: banks (with their checks), single checks. */
export function useAnswerQuestion(checkId: string) {
  return useMutation({
    mutationFn: (body: { version: number; answer: string }) =>
      apiRequest(checkSchema, `/api/checks/${checkId}/answer`, { method: 'POST', body }),
    onSuccess: useInvalidateChecks(),
  });
}

/** Invalidates: banks (with their checks), single checks. */
export function useWithdrawCheck(checkId: string) {
  return useMutation({
    mutationFn: (body: { version: number }) =>
      apiRequest(checkSchema, `/api/checks/${checkId}/withdraw`, { method: 'POST', body }),
    onSuccess: useInvalidateChecks(),
  });
}

/** Takes a moderator's correction back. Invalidates: banks (with their checks), single checks. */
export function useObjectToCorrection(checkId: string) {
  return useMutation({
    mutationFn: (body: { version: number; reason: string }) =>
      apiRequest(checkSchema, `/api/checks/${checkId}/objection`, { method: 'POST', body }),
    onSuccess: useInvalidateChecks(),
  });
}
