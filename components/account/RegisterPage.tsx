import { Link, Page, PageHead, Quiet, Row, Text } from '@/components/ui';
import { useRegister } from '@/lib/client/accounts';
import { registerRequestSchema } from '@/lib/contract/accounts';

import { AccountForm } from './AccountForm';
import { CheckMail } from './CheckMail';
import { EmailField } from './EmailField';
import { PasswordField } from './PasswordField';
import { useAccountForm } from './useAccountForm';
import { passwordHint } from './passwordHint';
import { ResendButton } from './ResendButton';

/** Opens an account. */
export function RegisterPage() {
  const register = useRegister();
  const { control, submit } = useAccountForm(
    registerRequestSchema,
    { email: '', password: '' },
    register.mutateAsync,
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
      <AccountForm control={control} label="Open the account" onSubmit={submit}>
        <EmailField control={control} name="email" hint="For signing in, and for mails about your checks." />
        <PasswordField
          control={control}
          name="password"
          label="Password"
          hint={passwordHint}
          autoComplete="new-password"
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
