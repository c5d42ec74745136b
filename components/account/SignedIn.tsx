import { Redirect, usePathname } from 'expo-router';
import { type ReactNode, useContext } from 'react';

import {
  ButtonLink,
  EmptyState,
  ErrorState,
  LoadingState,
  OfflineState,
  Page,
  PageHead,
  Skeleton,
} from '@/components/ui';
import { ApiError } from '@/lib/client/http';
import { rememberedAccount } from '@/lib/client/rememberedAccount';
import { useSession } from '@/lib/client/session';
import type { Role } from '@/lib/contract/accounts';

import { SignInAgainContext } from './SignInAgainContext';

interface SignedInProps {
  /** Who may see it; everybody with an account by default. The server checks again on every request. */
  roles?: readonly Role[];
  children: ReactNode;
}

/**
 * Lets through who is signed in with one of the roles; sends others to sign in and back, or says it is not theirs.
 * Whose sign-in has run out signs in again in place.
 */
export function SignedIn({ roles, children }: SignedInProps) {
  const { session, user, isPending, error, isFetching, refetch } = useSession();
  const here = usePathname();
  const signInAgain = useContext(SignInAgainContext);
  if (isPending) return <GateSkeleton />;
  if (!session) return <Unknown error={error} onRetry={() => void refetch()} isRetrying={isFetching} />;
  if (!user && signInAgain && rememberedAccount()?.hasRunOut) return <>{signInAgain}</>;
  if (!user) return <Redirect href={{ pathname: '/sign-in', params: { next: here } }} />;
  if (roles && !roles.includes(user.role))
    return (
      <Page>
        <PageHead title="Not for this account" />
        <EmptyState
          title={roles.includes('moderator') ? 'This page is for moderators' : 'This page is for stewards'}
        >
          Your account may not open it.
        </EmptyState>
      </Page>
    );
  if (roles && !roles.includes('owner') && user.secondFactor === 'due') return <SecondFactorDue />;
  return <>{children}</>;
}

function SecondFactorDue() {
  return (
    <Page narrow>
      <PageHead title="First a code at sign-in" />
      <EmptyState
        title="Set up the code to go on"
        action={<ButtonLink kind="primary" href="/second-factor" label="Set up the code" />}
      >
        Moderators and stewards sign in with a code too, so that a password that got out opens nothing.
      </EmptyState>
    </Page>
  );
}

interface UnknownProps {
  error: Error | null;
  onRetry: () => void;
  isRetrying: boolean;
}

/** Whether somebody is signed in could not be found out; sending them to sign in would be a guess. */
function Unknown({ error, ...retry }: UnknownProps) {
  return (
    <Page>
      {error instanceof ApiError && error.code !== 'offline' ? (
        <ErrorState {...retry} requestId={error.requestId}>
          {error.message}
        </ErrorState>
      ) : (
        <OfflineState {...retry} />
      )}
    </Page>
  );
}

function GateSkeleton() {
  return (
    <Page>
      <LoadingState label="Looking up your sign-in">
        <Skeleton height={40} width="50%" />
        <Skeleton height={240} />
      </LoadingState>
    </Page>
  );
}
