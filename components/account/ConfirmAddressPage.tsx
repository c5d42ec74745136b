import { ButtonLink } from '@/components/ui';
import { useConfirmEmail } from '@/lib/client/accounts';

import { LinkPage } from './LinkPage';

/** Moves an account to another address, by the link mailed there. */
export function ConfirmAddressPage({ token }: { token: string | undefined }) {
  return (
    <LinkPage
      token={token}
      title="Confirm your new address"
      label="Use this address from now on"
      action={useConfirmEmail()}
      spent="It has been used, has run out after 24 hours, or a newer one or a new password made it void. The account keeps the address it has."
      done={() => ({
        title: 'Your address is changed',
        sub: 'You sign in with the new one from now on, and mails go there.',
        actions: <ButtonLink href="/settings" label="To the account" />,
      })}
    >
      Press once to confirm that the address this link was mailed to is yours. Your account goes by it from
      then on.
    </LinkPage>
  );
}
