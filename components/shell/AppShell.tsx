import type { ReactNode } from 'react';
import { useSession } from '@/lib/client/session';
import { Shell } from './Shell';
import { placesFor } from './placesFor';

/** The shell with the places that whoever is signed in may go to. */
export function AppShell({ children }: { children: ReactNode }) {
  const { user, isDemo } = useSession();
  return <Shell {...placesFor(user, isDemo)}>{children}</Shell>;
}
