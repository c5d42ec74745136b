import { zodResolver } from '@hookform/resolvers/zod';
import { Redirect } from 'expo-router';
import { useForm } from 'react-hook-form';

import { Banner, Beside, Link, LoadingState, Page, PageHead, Row, Skeleton, Stack } from '@/components/ui';
import { useSignIn } from '@/lib/client/accounts';
import { ApiError } from '@/lib/client/http';
import { useSession } from '@/lib/client/session';
import { signInRequestSchema } from '@/lib/contract/accounts';

import { EmailField, PasswordField } from './AccountField';
import { AccountForm } from './AccountForm';
import { DemoAccounts } from './DemoAccounts';
import { formProblem, showFieldErrors } from './formProblem';
import { nextPlace } from './nextPlace';

/** Signs in and goes on to `next`, the page that asked for it. */
export function SignInPage({ next }: { next: string | undefined }) {
  const { user, isDemo, isPending } = useSession();
  const form = useForm({
    resolver: zodResolver(signInRequestSchema),
    mode: 'onTouched',
    defaultValues: { email: '', password: '' },
  });
  const signIn = useSignIn();
  const submit = form.handleSubmit((values) =>
    signIn.mutate(values, { onError: (error) => showFieldErrors(error, form) }),
  );
  const fillIn = (account: { email: string; password: string }) => {
    signIn.reset();
    form.reset(account);
  };

  if (user) return <Redirect href={nextPlace(next, user.role)} />;
  const isUnconfirmed = signIn.error instanceof ApiError && signIn.error.code === 'addressUnconfirmed';
  return (
    <Page>
      <PageHead
        title="Sign in"
        sub={
          next
            ? 'The page you asked for belongs to an account.'
            : 'For your own banks and checks. Measured lifetimes can be read without an account.'
        }
      />
      {isPending ? (
        <FormSkeleton />
      ) : (
        <Beside aside={isDemo && <DemoAccounts onChoose={fillIn} />}>
          <Stack gap="xl" style={{ maxWidth: 480 }}>
            <AccountForm
              label="Sign in"
              onSubmit={submit}
              busy={signIn.isPending}
              problem={isUnconfirmed ? undefined : formProblem(signIn.error, ['email', 'password'])}
            >
              <EmailField control={form.control} name="email" label="E-mail address" onSubmit={submit} />
              <PasswordField
                control={form.control}
                name="password"
                label="Password"
                autoComplete="current-password"
                onSubmit={submit}
              />
              {isUnconfirmed && (
                <Banner kind="caution" title="Confirm your address first">
                  We have just mailed you the link again. Open it, then sign in here.
                </Banner>
              )}
            </AccountForm>
            <Row gap="xl">
              <Link href="/register">Open an account</Link>
              <Link href="/reset">Choose a new password</Link>
            </Row>
          </Stack>
        </Beside>
      )}
    </Page>
  );
}

function FormSkeleton() {
  return (
    <LoadingState label="Looking up your sign-in">
      <Stack gap="xl" style={{ maxWidth: 480 }}>
        <Skeleton height={72} />
        <Skeleton height={116} />
        <Skeleton height={48} />
      </Stack>
    </LoadingState>
  );
}
