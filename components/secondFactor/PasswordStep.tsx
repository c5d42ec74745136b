import { AccountForm } from '@/components/account/AccountForm';
import { PasswordField } from '@/components/account/PasswordField';
import { useAccountForm } from '@/components/account/useAccountForm';
import { useBeginSecondFactor } from '@/lib/client/secondFactor';
import { beginSecondFactorRequestSchema, type SecondFactorOffer } from '@/lib/contract/secondFactor';

/** Asks for the password before a secret is shown. */
export function PasswordStep({ onOffer }: { onOffer: (offer: SecondFactorOffer) => void }) {
  const begin = useBeginSecondFactor();
  const { control, submit } = useAccountForm(
    beginSecondFactorRequestSchema,
    { currentPassword: '' },
    async (request) => onOffer(await begin.mutateAsync(request)),
  );
  return (
    <AccountForm control={control} label="Go on" onSubmit={submit}>
      <PasswordField
        control={control}
        name="currentPassword"
        label="Present password"
        autoComplete="current-password"
      />
    </AccountForm>
  );
}
