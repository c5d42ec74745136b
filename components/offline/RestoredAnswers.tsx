import { useQueryClient } from '@tanstack/react-query';
import { type ReactNode, useEffect, useState } from 'react';

import { useSession } from '@/lib/client/session';

import { PageSkeleton } from '../members/PageSkeleton';
import { restored } from './restored';

/** Shows a page when what the device keeps of its account is there, so that it opens without a network. */
export function RestoredAnswers({ children }: { children: ReactNode }) {
  const client = useQueryClient();
  const { user } = useSession();
  const [readyFor, setReadyFor] = useState<string | null>(null);
  const userId = user?.id ?? null;
  useEffect(() => {
    if (userId === null) return;
    let isShown = true;
    void restored(client, userId).then(() => isShown && setReadyFor(userId));
    return () => {
      isShown = false;
    };
  }, [client, userId]);
  return userId === null || readyFor === userId ? <>{children}</> : <PageSkeleton />;
}
