import { ButtonLink } from '@/components/ui';
import { useRemindLater } from '@/lib/client/reminders';
import { formatDate } from '@/lib/units';

import { LinkPage } from './LinkPage';

/** Puts a reminder off by a month, by the link in its mail. */
export function RemindLaterPage({ token }: { token: string | undefined }) {
  return (
    <LinkPage
      token={token}
      title="Remind me in a month"
      label="Remind me in a month"
      action={useRemindLater()}
      spent="The bank it was for is not there any more."
      done={({ dueOn }) => ({
        title: dueOn === null ? 'No reminder comes' : 'The reminder is put off',
        sub:
          dueOn === null
            ? 'Nothing is due for this bank, or its reminder is switched off.'
            : `The next one comes on ${formatDate(dueOn)}.`,
        actions: <ButtonLink href="/banks" label="To my banks" />,
      })}
    >
      Press once, and the reminder of this bank&apos;s check comes again in a month. If the check has been
      made meanwhile, nothing changes.
    </LinkPage>
  );
}
