import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';

import { Link, Page, PageHead, Quiet, Row, Text } from '@/components/ui';
import { useRegister } from '@/lib/client/accounts';
import { registerRequestSchema } from '@/lib/contract/accounts';

import { EmailField, PasswordField } from './AccountField';
import { AccountForm } from './AccountForm';
import { CheckMail } from './CheckMail';
import { formProblem, showFieldErrors } from './formProblem';
import { passwordHint } from './passwordHint';
import { ResendButton } from './ResendButton';

/** Opens an account. */
export function RegisterPage() {
  const form = useForm({
    resolver: zodResolver(registerRequestSchema),
    mode: 'onTouched',
    defaultValues: { email: '', password: '' },
  });
  const register = useRegister();
  const submit = form.handleSubmit((values) =>
    register.mutate(values, { onError: (error) => showFieldErrors(error, form) }),
  );

  if (register.isSuccess) {
    const { email } = register.variables;
    return (
      <CheckMail
        email={email}
        actions={<ResendButton email={email} />}
        onOtherAddress={() => register.reset()}
      >
        The link in it confirms that the address is yours. It can be used once, within 24 hours; then you can
        sign in.
      </CheckMail>
    );
  }
  return (
    <Page narrow>
      <PageHead title="Open an account" sub="To submit the yearly checks of your own bank." />
      <AccountForm
        label="Open the account"
        onSubmit={submit}
        busy={register.isPending}
        problem={formProblem(register.error, ['email', 'password'])}
      >
        <EmailField
          control={form.control}
          name="email"
          label="E-mail address"
          hint="For signing in, and for mails about your checks."
          onSubmit={submit}
        />
        <PasswordField
          control={form.control}
          name="password"
          label="Password"
          hint={passwordHint}
          autoComplete="new-password"
          onSubmit={submit}
        />
        <Quiet>
          Nothing that is published carries your address, and moderators never see it: to them a bank is five
          characters.
        </Quiet>
      </AccountForm>
      <Row gap="s">
        <Text>You have an account?</Text>
        <Link href="/sign-in">Sign in</Link>
      </Row>
    </Page>
  );
}
