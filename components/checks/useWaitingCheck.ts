import { useQuery } from '@tanstack/react-query';

import { useSession } from '@/lib/client/session';
import { type WaitingCheck, waitingChecksQuery } from '@/lib/client/waitingChecks';

/** The check of a bank that waits on this device for a connection. */
export function useWaitingCheck(bankId: string): { isPending: boolean; waiting: WaitingCheck | undefined } {
  const { user } = useSession();
  const query = useQuery({ ...waitingChecksQuery(user?.id ?? ''), enabled: user !== null });
  return {
    isPending: user !== null && query.isPending,
    waiting: query.data?.find((waiting) => waiting.bankId === bankId),
  };
}
