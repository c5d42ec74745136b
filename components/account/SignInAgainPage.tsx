import { useEffect } from 'react';

import { CodeStep } from '@/components/secondFactor/CodeStep';
import { Button, Page, PageHead, Row, Stack } from '@/components/ui';
import { useQueryClient } from '@tanstack/react-query';
import { useSignIn } from '@/lib/client/accounts';
import { forgetAnswers } from '@/lib/client/keptAnswers';
import { forgetAccount, rememberedAccount } from '@/lib/client/rememberedAccount';
import { sessionKey } from '@/lib/client/session';
import { signInRequestSchema } from '@/lib/contract/accounts';

import { AccountForm } from './AccountForm';
import { EmailField } from './EmailField';
import { PasswordField } from './PasswordField';
import { useAccountForm } from './useAccountForm';

/** In place of a page whose sign-in has run out: signs in again, and the page is there as it was left. */
export function SignInAgainPage() {
  const client = useQueryClient();
  const account = rememberedAccount()?.user;
  const signIn = useSignIn();
  const { control, submit } = useAccountForm(
    signInRequestSchema,
    { email: account?.email ?? '', password: '' },
    signIn.mutateAsync,
  );
  const userId = account?.id;
  useEffect(() => {
    // Signing out everywhere is for a phone that is lost: what was read on it goes, what was typed on it waits.
    if (userId !== undefined) void forgetAnswers(userId);
  }, [userId]);
  const asAnother = () => {
    forgetAccount();
    void client.invalidateQueries({ queryKey: sessionKey });
  };
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
        title="Sign in again"
        sub="Your sign-in has run out. What you typed is kept on this device, and you go on where you were."
      />
      <Stack gap="xl" style={{ maxWidth: 480 }}>
        <AccountForm control={control} label="Sign in" onSubmit={submit}>
          <EmailField control={control} name="email" />
          <PasswordField control={control} name="password" label="Password" autoComplete="current-password" />
        </AccountForm>
        <Row>
          <Button kind="quiet" label="Leave this page" onPress={asAnother} />
        </Row>
      </Stack>
    </Page>
  );
}
