import { ButtonLink } from '@/components/ui';
import { useUnsubscribe } from '@/lib/client/reminders';
import type { NoticeKind } from '@/lib/contract/reminders';

import { LinkPage } from './LinkPage';

const stopped: Record<NoticeKind, string> = {
  reminders: 'No more reminders of the yearly check are mailed to you.',
  decisions:
    'No more questions and decisions about your checks are mailed to you. They stand on the page of the bank.',
  releases: 'No more news of releases are mailed to you.',
};

/** Stops a kind of mail, by the link at its foot. */
export function UnsubscribePage({ token }: { token: string | undefined }) {
  return (
    <LinkPage
      token={token}
      title="Stop these mails"
      label="Stop them"
      action={useUnsubscribe()}
      spent="The account it was for is not there any more."
      done={({ kind }) => ({
        title: 'They are stopped',
        sub: stopped[kind],
        actions: <ButtonLink href="/settings" label="Choose which mails I want" />,
      })}
    >
      Press once, and mails of this kind are not sent to you any more. Mails the account itself needs, such as
      for a new password, still come.
    </LinkPage>
  );
}
