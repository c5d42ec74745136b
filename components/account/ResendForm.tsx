import { Banner } from '@/components/ui';
import { useResendVerification } from '@/lib/client/accounts';
import { resendVerificationRequestSchema } from '@/lib/contract/accounts';

import { AccountForm } from './AccountForm';
import { EmailField } from './EmailField';
import { useAccountForm } from './useAccountForm';

/** Asks for the mail that confirms an address, when its link is lost or spent. */
export function ResendForm() {
  const resend = useResendVerification();
  const { control, submit } = useAccountForm(
    resendVerificationRequestSchema,
    { email: '' },
    resend.mutateAsync,
  );
  if (resend.isSuccess)
    return (
      <Banner kind="done" title="Check your mail">
        {`If ${resend.variables.email} waits to be confirmed, another mail is on its way.`}
      </Banner>
    );
  return (
    <AccountForm control={control} label="Send another link" onSubmit={submit}>
      <EmailField control={control} name="email" />
    </AccountForm>
  );
}
