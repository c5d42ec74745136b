import { useState } from 'react';

import { AccountForm } from '@/components/account/AccountForm';
import { useAccountForm } from '@/components/account/useAccountForm';
import { Banner, Button, Row, Segmented, Stack } from '@/components/ui';
import { ApiError } from '@/lib/client/http';
import { useSignInCode } from '@/lib/client/secondFactor';
import { signInCodeRequestSchema } from '@/lib/contract/secondFactor';

import { CodeField } from './CodeField';

type Kind = 'app' | 'recovery';

const kinds: readonly { value: Kind; label: string }[] = [
  { value: 'app', label: 'Code of the app' },
  { value: 'recovery', label: 'Recovery code' },
];

/**
 * The second step of signing in: a code of the app, or a recovery code where the app is out of reach. What leads away
 * stands above the field, where a remark below it can't move it from under a finger.
 */
export function CodeStep({ onRestart }: { onRestart: () => void }) {
  const [kind, setKind] = useState<Kind>('app');
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
  const choose = (next: Kind) => {
    form.reset();
    setKind(next);
  };
  return (
    <Stack gap="xl" style={{ maxWidth: 480 }}>
      <Row gap="m">
        <Segmented label="Sign in with" value={kind} onChange={choose} options={kinds} />
        <Button kind="quiet" label="Begin again" onPress={onRestart} />
      </Row>
      <AccountForm key={kind} control={control} label="Sign in" onSubmit={submit}>
        <CodeField control={control} name="code" kind={kind} autoFocus />
      </AccountForm>
    </Stack>
  );
}
