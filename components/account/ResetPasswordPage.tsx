import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';

import { Banner, ButtonLink, Page, PageHead } from '@/components/ui';
import { useResetPassword } from '@/lib/client/accounts';
import { ApiError } from '@/lib/client/http';
import { resetRequestSchema } from '@/lib/contract/accounts';

import { PasswordField } from './AccountField';
import { AccountForm } from './AccountForm';
import { formProblem, showFieldErrors } from './formProblem';
import { passwordHint } from './passwordHint';

/** Chooses a new password by the token of a mail. */
export function ResetPasswordPage({ token }: { token: string }) {
  const form = useForm({
    resolver: zodResolver(resetRequestSchema.pick({ password: true })),
    mode: 'onTouched',
    defaultValues: { password: '' },
  });
  const reset = useResetPassword();
  const submit = form.handleSubmit(({ password }) =>
    reset.mutate({ token, password }, { onError: (error) => showFieldErrors(error, form) }),
  );

  if (reset.isSuccess)
    return (
      <Page narrow>
        <PageHead
          title="Your password is changed"
          sub="Every browser that was signed in has been signed out; those that are open now, within 15 minutes."
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
      <AccountForm
        label="Set the password"
        onSubmit={submit}
        busy={reset.isPending}
        problem={formProblem(reset.error, ['password'])}
      >
        <PasswordField
          control={form.control}
          name="password"
          label="New password"
          hint={passwordHint}
          autoComplete="new-password"
          onSubmit={submit}
        />
      </AccountForm>
    </Page>
  );
}
