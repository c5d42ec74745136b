import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import { acceptedSchema, sessionSchema } from '@/lib/contract/accounts';
import {
  type BeginSecondFactorRequest,
  type ConfirmSecondFactorRequest,
  type PasswordAndCodeRequest,
  recoveryCodesSchema,
  secondFactorOfferSchema,
  secondFactorSchema,
  type SignInCodeRequest,
} from '@/lib/contract/secondFactor';

import { adoptSession } from './accounts';
import { apiRequest } from './http';
import { sessionKey } from './session';

const path = '/api/account/second-factor';

export const secondFactorQuery = queryOptions({
  queryKey: ['secondFactor'],
  queryFn: ({ signal }) => apiRequest(secondFactorSchema, path, { signal }),
  staleTime: 0,
});

/** Ends a sign-in by a code. */
export function useSignInCode() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (body: SignInCodeRequest) =>
      apiRequest(sessionSchema, '/api/account/sign-in-code', { method: 'POST', body }),
    onSuccess: (session) => adoptSession(queryClient, session),
  });
}

/** Draws a secret for an authenticator app. It is kept in the component that asked, and nowhere else. */
export function useBeginSecondFactor() {
  return useMutation({
    mutationFn: (body: BeginSecondFactorRequest) =>
      apiRequest(secondFactorOfferSchema, `${path}/begin`, { method: 'POST', body }),
    gcTime: 0,
  });
}

/** The state of the second step, and what the session says of it. */
function useInvalidateSecondFactor() {
  const client = useQueryClient();
  return () => {
    for (const queryKey of [secondFactorQuery.queryKey, sessionKey])
      void client.invalidateQueries({ queryKey });
  };
}

/** Turns it on; answers the recovery codes. Invalidates: its state, the session. */
export function useConfirmSecondFactor() {
  const invalidate = useInvalidateSecondFactor();
  return useMutation({
    mutationFn: (body: ConfirmSecondFactorRequest) =>
      apiRequest(recoveryCodesSchema, `${path}/confirm`, { method: 'POST', body }),
    onSuccess: invalidate,
    gcTime: 0,
  });
}

/** Fresh recovery codes in place of the earlier ones. Invalidates as useConfirmSecondFactor. */
export function useRenewRecoveryCodes() {
  const invalidate = useInvalidateSecondFactor();
  return useMutation({
    mutationFn: (body: PasswordAndCodeRequest) =>
      apiRequest(recoveryCodesSchema, `${path}/recovery-codes`, { method: 'POST', body }),
    onSuccess: invalidate,
    gcTime: 0,
  });
}

/** Turns it off. Invalidates as useConfirmSecondFactor. */
export function useTurnOffSecondFactor() {
  const invalidate = useInvalidateSecondFactor();
  return useMutation({
    mutationFn: (body: PasswordAndCodeRequest) =>
      apiRequest(acceptedSchema, `${path}/turn-off`, { method: 'POST', body }),
    onSuccess: invalidate,
  });
}
