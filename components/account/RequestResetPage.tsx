import { Link, Page, PageHead } from '@/components/ui';
import { useRequestReset } from '@/lib/client/accounts';
import { requestResetRequestSchema } from '@/lib/contract/accounts';

import { AccountForm } from './AccountForm';
import { CheckMail } from './CheckMail';
import { EmailField } from './EmailField';
import { useAccountForm } from './useAccountForm';

/** Asks for a mail with the link to choose a new password. */
export function RequestResetPage({ email = '' }: { email?: string }) {
  const request = useRequestReset();
  const { control, submit } = useAccountForm(requestResetRequestSchema, { email }, request.mutateAsync);

  if (request.isSuccess)
    return (
      <CheckMail email={request.variables.email} onOtherAddress={() => request.reset()}>
        If the address has an account, the link in the mail lets you choose a new password. It can be used
        once, within an hour.
      </CheckMail>
    );
  return (
    <Page narrow>
      <PageHead
        title="Choose a new password"
        sub="We mail a link to your address; it opens the page where you choose."
      />
      <AccountForm control={control} label="Mail me the link" onSubmit={submit}>
        <EmailField control={control} name="email" />
      </AccountForm>
      <Link href="/sign-in">Back to signing in</Link>
    </Page>
  );
}
