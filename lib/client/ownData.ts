import { useMutation, useQueryClient } from '@tanstack/react-query';

import { type DeleteAccountRequest, sessionSchema } from '@/lib/contract/accounts';

import { adoptSession } from './accounts';
import { apiRequest, saveFile } from './http';

/** Files of one's own data and what they are called. */
export const ownFiles = {
  everything: '/api/account/own-data.json',
  checks: '/api/account/checks.csv',
} as const;

/** Saves a file of the API on this device. */
export function useSaveFile() {
  return useMutation({ mutationFn: saveFile });
}

/** Deletes the account; the browser is a visitor's afterwards. */
export function useDeleteAccount() {
  const queryClient = useQueryClient();
  return useMutation({
    mutationFn: (body: DeleteAccountRequest) =>
      apiRequest(sessionSchema, '/api/account/delete', { method: 'POST', body }),
    onSuccess: (session) => adoptSession(queryClient, session),
  });
}
