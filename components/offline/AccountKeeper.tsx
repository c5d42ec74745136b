import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'expo-router';
import { useCallback, useEffect } from 'react';

import { forgetDraft } from '@/components/forms';
import { useToast } from '@/components/ui';
import { fetchAhead, keepAnswers } from '@/lib/client/keptAnswers';
import { sendWaiting, type SendingOutcome, waitingChecksQuery } from '@/lib/client/waitingChecks';
import type { SessionUser } from '@/lib/contract/accounts';

import { restored } from './restored';

const retryMs = 20_000;

/** While an account is signed in: keeps what its pages need on the device, and sends what waits when there is a network. */
export function AccountKeeper({ user: { id: userId, role } }: { user: SessionUser }) {
  const client = useQueryClient();
  useEffect(() => {
    const stop = keepAnswers(client, userId);
    if (role === 'owner') void restored(client, userId).then(() => fetchAhead(client, userId));
    return stop;
  }, [client, userId, role]);
  useSending(userId);
  return null;
}

function useSending(userId: string) {
  const client = useQueryClient();
  const tell = useTelling(userId);
  const { data = [] } = useQuery(waitingChecksQuery(userId));
  const isWaiting = data.some(({ problem }) => problem === null);
  useEffect(() => {
    if (!isWaiting) return;
    const attempt = () => {
      if (document.visibilityState === 'visible') void sendWaiting(client, userId).then(tell);
    };
    attempt();
    const timer = setInterval(attempt, retryMs);
    window.addEventListener('online', attempt);
    document.addEventListener('visibilitychange', attempt);
    return () => {
      clearInterval(timer);
      window.removeEventListener('online', attempt);
      document.removeEventListener('visibilitychange', attempt);
    };
  }, [client, userId, isWaiting, tell]);
}

/** Says what became of the checks that waited; a draft has done its work once its check is sent. */
function useTelling(userId: string) {
  const toast = useToast();
  const router = useRouter();
  return useCallback(
    ({ sent, refused }: SendingOutcome) => {
      for (const { waiting } of sent) forgetDraft(`${userId}/check/${waiting.bankId}`);
      const [first] = refused;
      if (first) {
        const href = { pathname: '/banks/[bankId]/check', params: { bankId: first.bankId } } as const;
        toast({
          text: `The check of ${first.bankName} could not be sent as it is.`,
          action: { label: 'Look at it', onPress: () => router.push(href) },
        });
      } else if (sent.length > 0) {
        const names = sent.map(({ waiting }) => waiting.bankName).join(', ');
        toast({ text: `The check of ${names} that waited is sent. A moderator looks at it next.` });
      }
    },
    [userId, toast, router],
  );
}
