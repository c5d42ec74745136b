import { type ReactNode, useEffect } from 'react';
import { useSession } from '@/lib/client/session';
import { prefetchMembers } from '../members';
import { Shell } from './Shell';
import { placesFor } from './placesFor';

/** The shell with the places that whoever is signed in may go to. */
export function AppShell({ children }: { children: ReactNode }) {
  const { user, isDemo } = useSession();
  const isMember = user !== null;
  useEffect(() => {
    if (isMember) prefetchMembers();
  }, [isMember]);
  return <Shell {...placesFor(user, isDemo)}>{children}</Shell>;
}
