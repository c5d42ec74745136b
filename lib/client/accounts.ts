import { type QueryClient, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import {
  acceptedSchema,
  type ChangeEmailRequest,
  type ChangePasswordRequest,
  type ConfirmEmailRequest,
  demoAccountsSchema,
  outboxSchema,
  type RegisterRequest,
  type RequestResetRequest,
  type ResendVerificationRequest,
  type ResetRequest,
  type Session,
  sessionSchema,
  signInAnswerSchema,
  type SignInRequest,
  type SignOutRequest,
  type VerifyRequest,
} from '@/lib/contract/accounts';
import { type NoticeChoice, noticeChoiceSchema } from '@/lib/contract/reminders';

import { banksKey } from './banks';
import { apiRequest } from './http';
import { forgetAnswers } from './keptAnswers';
import { forgetAccount, rememberAccount, rememberedAccount } from './rememberedAccount';
import { sessionKey } from './session';
import { keepSession } from './sessionTokens';

/** The accounts the demo offers; there in demo mode only. */
export const demoAccountsQuery = queryOptions({
  queryKey: ['demoAccounts'],
  queryFn: ({ signal }) => apiRequest(demoAccountsSchema, '/api/account/demo-accounts', { signal }),
  staleTime: Infinity,
});

/** The mails the demo keeps instead of sending them, the newest first. */
export const outboxQuery = queryOptions({
  queryKey: ['outbox'],
  queryFn: ({ signal }) => apiRequest(outboxSchema, '/api/outbox', { signal }),
  staleTime: 0,
});

const post = (path: string, body: object) => apiRequest(acceptedSchema, path, { method: 'POST', body });

/** Opens an account; the answer is the same whether or not the address has one. */
export function useRegister() {
  return useMutation({ mutationFn: (request: RegisterRequest) => post('/api/account/register', request) });
}

/** Confirms an address by the token of a mail. */
export function useVerify() {
  return useMutation({ mutationFn: (request: VerifyRequest) => post('/api/account/verify', request) });
}

export function useResendVerification() {
  return useMutation({
    mutationFn: (request: ResendVerificationRequest) => post('/api/account/resend-verification', request),
  });
}

export function useRequestReset() {
  return useMutation({
    mutationFn: (request: RequestResetRequest) => post('/api/account/request-reset', request),
  });
}

/** Sets a new password by the token of a mail, which signs this browser out too. */
export function useResetPassword() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (request: ResetRequest) => post('/api/account/reset', request),
    onSuccess: () => queryClient.invalidateQueries(),
  });
}

/** Signs in; where the answer asks for a code the browser is a visitor's still, and useSignInCode goes on. */
export function useSignIn() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (body: SignInRequest) =>
      apiRequest(signInAnswerSchema, '/api/account/sign-in', { method: 'POST', body }),
    onSuccess: (session) =>
      session.asksForCode ? void keepSession(session) : adoptSession(queryClient, session),
  });
}

/** Signs out here or everywhere. */
export function useSignOut() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (body: SignOutRequest) =>
      apiRequest(sessionSchema, '/api/account/sign-out', { method: 'POST', body }),
    onSuccess: (session) => adoptSession(queryClient, session),
  });
}

/** Sets a new password, which ends every other sign-in. */
export function useChangePassword() {
  return useMutation({
    mutationFn: (request: ChangePasswordRequest) => post('/api/account/change-password', request),
  });
}

/** Asks for the mail by which the account moves to another address. */
export function useChangeEmail() {
  return useMutation({
    mutationFn: (request: ChangeEmailRequest) => post('/api/account/change-email', request),
  });
}

/** Moves an account to another address by the token of a mail. Invalidates: who the browser is signed in as. */
export function useConfirmEmail() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (request: ConfirmEmailRequest) => post('/api/account/confirm-email', request),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: sessionKey }),
  });
}

/** Which mails the account wants. */
export const noticesQuery = queryOptions({
  queryKey: ['notices'],
  queryFn: ({ signal }) => apiRequest(noticeChoiceSchema, '/api/account/notices', { signal }),
});

/** Sets: the choice. Invalidates: banks, whose reminders say whether they are mailed. */
export function useChooseNotices() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (body: NoticeChoice) =>
      apiRequest(noticeChoiceSchema, '/api/account/notices', { method: 'PUT', body }),
    onSuccess: (choice) => {
      queryClient.setQueryData(noticesQuery.queryKey, choice);
      return queryClient.invalidateQueries({ queryKey: banksKey });
    },
  });
}

/** Takes on another sign-in: what was read under the one before is forgotten, on the device too. */
export function adoptSession(queryClient: QueryClient, session: Session): void {
  const before = rememberedAccount()?.user.id;
  if (before !== undefined && before !== session.user?.id) void forgetAnswers(before);
  if (session.user) rememberAccount(session);
  else forgetAccount();
  queryClient.setQueryData(sessionKey, keepSession(session));
  void queryClient.resetQueries({ predicate: ({ queryKey }) => queryKey[0] !== sessionKey[0] });
}
