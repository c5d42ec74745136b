import { AccountForm } from '@/components/account/AccountForm';
import { useAccountForm } from '@/components/account/useAccountForm';
import { DefinitionList, Disclosure, Figure, Link, Stack, Text } from '@/components/ui';
import { useConfirmSecondFactor } from '@/lib/client/secondFactor';
import { confirmSecondFactorRequestSchema, type SecondFactorOffer } from '@/lib/contract/secondFactor';

import { CodeField } from './CodeField';
import { QrCode } from './QrCode';

interface ConfirmStepProps {
  offer: SecondFactorOffer;
  onCodes: (codes: readonly string[]) => void;
}

/** In groups of four, as it is easier to type. */
const grouped = (secret: string) => secret.match(/.{1,4}/g)!.join(' ');

/** Hands the secret to an authenticator app, and asks for a first code of it. */
export function ConfirmStep({ offer: { secret, uri, qr }, onCodes }: ConfirmStepProps) {
  const confirm = useConfirmSecondFactor();
  const { control, submit } = useAccountForm(
    confirmSecondFactorRequestSchema,
    { code: '' },
    async (request) => onCodes((await confirm.mutateAsync(request)).recoveryCodes),
  );
  return (
    <Stack gap="l">
      <Text>
        Add an account in your authenticator app and scan this picture with it. On the phone itself,{' '}
        <Link href={uri as `otpauth:${string}`}>open the app with this link</Link>.
      </Text>
      <QrCode {...qr} label="QR code for an authenticator app; the secret it holds stands below as text" />
      <Disclosure label="Type the secret instead">
        <DefinitionList
          items={[
            { label: 'Secret', value: <Figure>{grouped(secret)}</Figure> },
            { label: 'Kind', value: 'By time' },
            { label: 'Digits', value: '6' },
            { label: 'New code every', value: '30 s' },
          ]}
        />
      </Disclosure>
      <AccountForm control={control} label="Turn it on" onSubmit={submit}>
        <CodeField
          control={control}
          name="code"
          hint="The six digits the app shows for Ebbline now. They show that it has the secret."
        />
      </AccountForm>
    </Stack>
  );
}
