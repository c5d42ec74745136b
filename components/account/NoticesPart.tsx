import { useQuery } from '@tanstack/react-query';

import { QueryView } from '@/components/QueryView';
import { Banner, Checkbox, Heading, LoadingState, Quiet, SkeletonRows, Stack } from '@/components/ui';
import { noticesQuery, useChooseNotices } from '@/lib/client/accounts';
import type { NoticeChoice, NoticeKind } from '@/lib/contract/reminders';

import { problemOf } from './problemOf';

const kinds: readonly { kind: NoticeKind; label: string; hint: string }[] = [
  {
    kind: 'reminders',
    label: 'Reminders of the yearly check',
    hint: 'One mail for each bank on the day its check is due. The day is set on the page of the bank.',
  },
  {
    kind: 'decisions',
    label: 'Questions and decisions about my checks',
    hint: 'Without them, a question waits unseen until you open the bank.',
  },
  { kind: 'releases', label: 'News of releases', hint: 'When the public data come out anew.' },
];

/** Which mails one wants; each choice takes effect at once. */
export function NoticesPart() {
  const query = useQuery(noticesQuery);
  return (
    <Stack gap="m">
      <Heading>Mails</Heading>
      <QueryView query={query} loading={<ChoiceSkeleton />}>
        {(choice) => <Choice choice={choice} />}
      </QueryView>
      <Quiet>
        What the account itself needs is always mailed: confirming an address, a new password, and what was
        changed about either.
      </Quiet>
    </Stack>
  );
}

function Choice({ choice }: { choice: NoticeChoice }) {
  const choose = useChooseNotices();
  // What was just pressed shows while it is on its way, and goes back if it did not arrive.
  const shown = choose.isPending ? choose.variables : choice;
  return (
    <Stack gap="s">
      {kinds.map(({ kind, label, hint }) => (
        <Checkbox
          key={kind}
          label={label}
          hint={hint}
          checked={shown[kind]}
          disabled={choose.isPending}
          onChange={(isWanted) => choose.mutate({ ...choice, [kind]: isWanted })}
        />
      ))}
      {choose.error && (
        <Banner kind="error" title="The choice was not kept">
          {problemOf(choose.error)}
        </Banner>
      )}
    </Stack>
  );
}

function ChoiceSkeleton() {
  return (
    <LoadingState label="Loading which mails you want">
      <SkeletonRows count={3} height={64} />
    </LoadingState>
  );
}
