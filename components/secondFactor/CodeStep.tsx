import { useState } from 'react';

import { AccountForm } from '@/components/account/AccountForm';
import { useAccountForm } from '@/components/account/useAccountForm';
import { Banner, Button, Row, Stack } from '@/components/ui';
import { ApiError } from '@/lib/client/http';
import { useSignInCode } from '@/lib/client/secondFactor';
import { signInCodeRequestSchema } from '@/lib/contract/secondFactor';

import { CodeField } from './CodeField';

/** The second step of signing in: a code of the app, or a recovery code where the app is out of reach. */
export function CodeStep({ onRestart }: { onRestart: () => void }) {
  const [kind, setKind] = useState<'app' | 'recovery'>('app');
  const signIn = useSignInCode();
  const { form, control, submit } = useAccountForm(signInCodeRequestSchema, { code: '' }, signIn.mutateAsync);
  const { error } = signIn;
  if (error instanceof ApiError && error.code === 'gone')
    return (
      <Banner
        kind="caution"
        title="The sign-in took too long"
        actions={<Button label="Enter the password again" onPress={onRestart} />}
      >
        {error.message}
      </Banner>
    );
  const swap = () => {
    form.reset();
    setKind(kind === 'app' ? 'recovery' : 'app');
  };
  return (
    <Stack gap="xl" style={{ maxWidth: 480 }}>
      <AccountForm key={kind} control={control} label="Sign in" onSubmit={submit}>
        <CodeField control={control} name="code" kind={kind} autoFocus />
      </AccountForm>
      <Row gap="s">
        <Button
          kind="quiet"
          label={kind === 'app' ? 'Use a recovery code' : 'Use a code of the app'}
          onPress={swap}
        />
        <Button kind="quiet" label="Begin again" onPress={onRestart} />
      </Row>
    </Stack>
  );
}
