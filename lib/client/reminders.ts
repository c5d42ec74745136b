import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import {
  remindedLaterSchema,
  reminderSchema,
  type SetReminderRequest,
  unsubscribedSchema,
} from '@/lib/contract/reminders';

import { noticesQuery } from './accounts';
import { banksKey } from './banks';
import { apiRequest } from './http';

/** When a bank's next check is due, and whether its owner is reminded. */
export const reminderQuery = (bankId: string) =>
  queryOptions({
    queryKey: [...banksKey, bankId, 'reminder'] as const,
    queryFn: ({ signal }) => apiRequest(reminderSchema, `/api/banks/${bankId}/reminder`, { signal }),
  });

/** Sets: the bank's reminder. */
export function useSetReminder(bankId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: SetReminderRequest) =>
      apiRequest(reminderSchema, `/api/banks/${bankId}/reminder`, { method: 'PUT', body }),
    onSuccess: (reminder) => client.setQueryData(reminderQuery(bankId).queryKey, reminder),
  });
}

/** Puts a reminder off by the token of its mail. Invalidates: banks. */
export function useRemindLater() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: { token: string }) =>
      apiRequest(remindedLaterSchema, '/api/reminders/later', { method: 'POST', body }),
    onSuccess: () => client.invalidateQueries({ queryKey: banksKey }),
  });
}

/** Stops a kind of mail by the token of one. Invalidates: the choice of mails. */
export function useUnsubscribe() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ token }: { token: string }) =>
      apiRequest(unsubscribedSchema, `/api/unsubscribe?token=${encodeURIComponent(token)}`, {
        method: 'POST',
      }),
    onSuccess: () => client.invalidateQueries({ queryKey: noticesQuery.queryKey }),
  });
}
