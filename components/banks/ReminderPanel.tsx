import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { SaveFileButton } from '@/components/account/SaveFileButton';
import { QueryView } from '@/components/QueryView';
import { Button, Heading, Link, LoadingState, Quiet, Row, SkeletonRows, Stack, Text } from '@/components/ui';
import { reminderQuery } from '@/lib/client/reminders';
import type { Reminder } from '@/lib/contract/reminders';
import { calendarDateOf, formatDate } from '@/lib/units';

import { ReminderDialog } from './ReminderDialog';

/** When a bank's next check is due, whether its owner is reminded, and a calendar entry of it. */
export function ReminderPanel({ bankId }: { bankId: string }) {
  const query = useQuery(reminderQuery(bankId));
  return (
    <Stack gap="s">
      <Heading>Next check</Heading>
      <QueryView query={query} loading={<ReminderSkeleton />}>
        {(reminder) => (reminder.isEnded ? <Ended /> : <Due reminder={reminder} />)}
      </QueryView>
    </Stack>
  );
}

function Ended() {
  return <Quiet>This bank was sold or retired, so no check is due any more. What was measured counts.</Quiet>;
}

function Due({ reminder }: { reminder: Reminder }) {
  const [isChanging, setIsChanging] = useState(false);
  const { bankId, dueOn } = reminder;
  const isOverdue = dueOn !== null && dueOn < calendarDateOf(new Date(), 'local');
  return (
    <>
      {dueOn !== null && (
        <Text>{`Due ${isOverdue ? 'since' : 'on'} ${formatDate(dueOn)}, ${reasonOf(reminder)}.`}</Text>
      )}
      <Mailed reminder={reminder} isOverdue={isOverdue} />
      <Row align="flex-start">
        <Button label="Change the day" onPress={() => setIsChanging(true)} />
        {dueOn !== null && !isOverdue && (
          <SaveFileButton path={`/api/banks/${bankId}/reminder.ics`} label="Save for the calendar" />
        )}
      </Row>
      {isChanging && <ReminderDialog reminder={reminder} onClose={() => setIsChanging(false)} />}
    </>
  );
}

const reasonOf = ({ ownDueOn, lastTestedOn }: Reminder) =>
  ownDueOn !== null || lastTestedOn === null
    ? 'the day you chose'
    : `a year after the check of ${formatDate(lastTestedOn)}`;

interface MailedProps {
  reminder: Reminder;
  isOverdue: boolean;
}

function Mailed({ reminder: { isOn, isMailed, dueOn }, isOverdue }: MailedProps) {
  if (!isOn) return <Quiet>No reminder is mailed for this bank.</Quiet>;
  if (dueOn === null)
    return <Quiet>A year after the first check a reminder is mailed, or on a day you choose.</Quiet>;
  if (isOverdue)
    return <Quiet>A reminder comes once for each day that is set; choose another to get one more.</Quiet>;
  if (isMailed) return <Quiet>A reminder is mailed on that day.</Quiet>;
  return (
    <Quiet>
      {'No reminder is mailed, as your account wants none. '}
      <Link href="/settings" size="small">
        Choose which mails you want
      </Link>
    </Quiet>
  );
}

function ReminderSkeleton() {
  return (
    <LoadingState label="Loading when the next check is due">
      <SkeletonRows count={2} height={28} />
    </LoadingState>
  );
}
