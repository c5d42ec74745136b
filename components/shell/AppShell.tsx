import { type ReactNode, useEffect } from 'react';
import { useSession } from '@/lib/client/session';
import { SignInAgainContext } from '../account/SignInAgainContext';
import { AccountKeeper, prefetchMembers, SignInAgainPage } from '../members';
import { useOfflineShell } from '../offline/useOfflineShell';
import { Shell } from './Shell';
import { placesFor } from './placesFor';

/** The shell with the places that whoever is signed in may go to. */
export function AppShell({ children }: { children: ReactNode }) {
  const { user, isDemo } = useSession();
  const isMember = user !== null;
  useEffect(() => {
    if (isMember) prefetchMembers();
  }, [isMember]);
  useOfflineShell();
  return (
    <SignInAgainContext value={<SignInAgainPage />}>
      {user && <AccountKeeper key={user.id} user={user} />}
      <Shell {...placesFor(user, isDemo)}>{children}</Shell>
    </SignInAgainContext>
  );
}
