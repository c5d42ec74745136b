import {
  Banner,
  ButtonLink,
  DefinitionList,
  Disclosure,
  Heading,
  Link,
  Quiet,
  Stack,
  useToast,
} from '@/components/ui';
import { useChangeEmail, useChangePassword } from '@/lib/client/accounts';
import { useSession } from '@/lib/client/session';
import {
  changeEmailRequestSchema,
  changePasswordRequestSchema,
  type Role,
  type SessionUser,
} from '@/lib/contract/accounts';

import { AccountForm } from './AccountForm';
import { EmailField } from './EmailField';
import { PasswordField } from './PasswordField';
import { passwordHint } from './passwordHint';
import { useAccountForm } from './useAccountForm';

const roleWords: Record<Role, string> = {
  owner: 'Owner of a bank',
  moderator: 'Moderator',
  steward: 'Steward',
};

/** Who one is here, and how one signs in. */
export function SignInPart({ user }: { user: SessionUser }) {
  return (
    <Stack gap="m">
      <Heading>Signing in</Heading>
      <DefinitionList
        items={[
          { label: 'E-mail address', value: user.email },
          { label: 'Role', value: roleWords[user.role] },
        ]}
      />
      <Disclosure label="Change the e-mail address">
        <ChangeEmail />
      </Disclosure>
      <Disclosure label="Change the password">
        <ChangePassword email={user.email} />
      </Disclosure>
    </Stack>
  );
}

const noEmail = { email: '', currentPassword: '' };

function ChangeEmail() {
  const { isDemo } = useSession();
  const change = useChangeEmail();
  const { control, submit } = useAccountForm(changeEmailRequestSchema, noEmail, change.mutateAsync, (form) =>
    form.reset(noEmail),
  );
  return (
    <Stack gap="l">
      <Quiet>
        The account keeps its present address until the link mailed to the new one has been opened, within 24
        hours. The present address is told.
      </Quiet>
      {change.isSuccess && (
        <Banner
          kind="done"
          title="Check the mail of the new address"
          actions={isDemo && <ButtonLink href="/outbox" label="Open the outbox" />}
        >
          {`A link is on its way to ${change.variables.email}.`}
        </Banner>
      )}
      <AccountForm control={control} label="Mail the link" onSubmit={submit}>
        <EmailField control={control} name="email" label="New e-mail address" autoComplete="email" />
        <PasswordField
          control={control}
          name="currentPassword"
          label="Present password"
          autoComplete="current-password"
        />
      </AccountForm>
    </Stack>
  );
}

const noPassword = { currentPassword: '', password: '' };

function ChangePassword({ email }: { email: string }) {
  const toast = useToast();
  const change = useChangePassword();
  const { control, submit } = useAccountForm(
    changePasswordRequestSchema,
    noPassword,
    change.mutateAsync,
    (form) => {
      form.reset(noPassword);
      toast({ text: 'The password is changed. Other browsers are signed out.' });
    },
  );
  return (
    <Stack gap="l">
      <Quiet>Every other browser that is signed in with this account is signed out.</Quiet>
      <AccountForm control={control} label="Change the password" onSubmit={submit}>
        <PasswordField
          control={control}
          name="currentPassword"
          label="Present password"
          autoComplete="current-password"
        />
        <PasswordField
          control={control}
          name="password"
          label="New password"
          hint={passwordHint}
          autoComplete="new-password"
        />
      </AccountForm>
      <Link href={{ pathname: '/reset', params: { email } }}>The present password is forgotten</Link>
    </Stack>
  );
}
