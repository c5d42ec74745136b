import { Banner, ButtonLink, Page, PageHead } from '@/components/ui';
import { useResetPassword } from '@/lib/client/accounts';
import { ApiError } from '@/lib/client/http';
import { resetRequestSchema } from '@/lib/contract/accounts';

import { AccountForm } from './AccountForm';
import { PasswordField } from './PasswordField';
import { passwordHint } from './passwordHint';
import { useAccountForm } from './useAccountForm';

const newPasswordSchema = resetRequestSchema.pick({ password: true });

/** Chooses a new password by the token of a mail. */
export function ResetPasswordPage({ token }: { token: string }) {
  const reset = useResetPassword();
  const { control, submit } = useAccountForm(newPasswordSchema, { password: '' }, ({ password }) =>
    reset.mutateAsync({ token, password }),
  );

  if (reset.isSuccess)
    return (
      <Page narrow>
        <PageHead
          title="Your password is changed"
          sub="Every browser that was signed in has been signed out."
        />
        <ButtonLink kind="primary" href="/sign-in" label="Sign in" />
      </Page>
    );
  if (reset.error instanceof ApiError && reset.error.code === 'gone')
    return (
      <Page narrow>
        <PageHead title="Choose a new password" />
        <Banner
          kind="caution"
          title="This link has been used or has run out"
          actions={<ButtonLink href="/reset" label="Have another link mailed" />}
        >
          A link is good for one hour and for one use, and a newer one makes it void.
        </Banner>
      </Page>
    );
  return (
    <Page narrow>
      <PageHead title="Choose a new password" sub="It takes the place of the one before at once." />
      <AccountForm control={control} label="Set the password" onSubmit={submit}>
        <PasswordField
          control={control}
          name="password"
          label="New password"
          hint={passwordHint}
          autoComplete="new-password"
        />
      </AccountForm>
    </Page>
  );
}
