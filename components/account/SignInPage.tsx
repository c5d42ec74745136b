import { Redirect } from 'expo-router';

import { Beside, Link, LoadingState, Page, PageHead, Row, Skeleton, Stack } from '@/components/ui';
import { useSignIn } from '@/lib/client/accounts';
import { useSession } from '@/lib/client/session';
import { signInRequestSchema } from '@/lib/contract/accounts';

import { CodeStep } from '@/components/secondFactor/CodeStep';

import { AccountForm } from './AccountForm';
import { DemoAccounts } from './DemoAccounts';
import { EmailField } from './EmailField';
import { nextPlace } from './nextPlace';
import { PasswordField } from './PasswordField';
import { useAccountForm } from './useAccountForm';

/** Signs in and goes on to `next`, the page that asked for it. */
export function SignInPage({ next }: { next: string | undefined }) {
  const { user, isDemo, isPending } = useSession();
  const signIn = useSignIn();
  const { form, control, submit } = useAccountForm(
    signInRequestSchema,
    { email: '', password: '' },
    signIn.mutateAsync,
  );

  if (user) return <Redirect href={nextPlace(next, user.role)} />;
  if (signIn.data?.asksForCode)
    return (
      <Page>
        <PageHead title="Enter the code" sub="The password is right. This account asks for a code too." />
        <CodeStep onRestart={signIn.reset} />
      </Page>
    );
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
        <Beside aside={isDemo && <DemoAccounts onChoose={(account) => form.reset(account)} />}>
          <Stack gap="xl" style={{ maxWidth: 480 }}>
            <AccountForm control={control} label="Sign in" onSubmit={submit}>
              <EmailField control={control} name="email" />
              <PasswordField
                control={control}
                name="password"
                label="Password"
                autoComplete="current-password"
              />
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
