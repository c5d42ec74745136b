import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { QueryView } from '@/components/QueryView';
import {
  Button,
  EmptyState,
  LoadingState,
  Page,
  PageHead,
  Skeleton,
  Stack,
  TextField,
} from '@/components/ui';
import { outboxQuery } from '@/lib/client/accounts';
import type { Outbox } from '@/lib/contract/accounts';

import { OutboxMail } from './OutboxMail';

const step = 20;

/** The mails a demo keeps instead of sending, for who tries it out or works on it. */
export function OutboxPage() {
  const query = useQuery(outboxQuery);
  return (
    <Page narrow>
      <PageHead
        title="Outbox"
        sub="For developers: the mails this demo keeps instead of sending, the newest first."
        actions={<Button label="Look again" busy={query.isFetching} onPress={() => void query.refetch()} />}
      />
      <QueryView query={query} loading={<MailSkeleton />}>
        {({ messages }) => (messages.length === 0 ? <NoMail /> : <MailList messages={messages} />)}
      </QueryView>
    </Page>
  );
}

function MailList({ messages }: Outbox) {
  const [address, setAddress] = useState('');
  const [shown, setShown] = useState(step);
  const found = messages.filter(({ to }) => to.includes(address.trim().toLowerCase()));
  return (
    <Stack gap="xl">
      <TextField
        label="Only mails to"
        optional
        inputMode="search"
        hint="A part of the address is enough."
        value={address}
        onChange={setAddress}
      />
      {found.length === 0 && (
        <EmptyState
          title="No mail to such an address"
          action={<Button label="Show all" onPress={() => setAddress('')} />}
        >
          {`None of the newest ${messages.length} mails went there.`}
        </EmptyState>
      )}
      <Stack gap="xl">
        {found.slice(0, shown).map((mail) => (
          <OutboxMail key={mail.id} mail={mail} />
        ))}
      </Stack>
      {found.length > shown && <Button label="Show older mails" onPress={() => setShown(shown + step)} />}
    </Stack>
  );
}

function NoMail() {
  return (
    <EmptyState title="No mail yet">
      Open an account, ask for a new password or decide on a submission, and the mail for it is here.
    </EmptyState>
  );
}

function MailSkeleton() {
  return (
    <LoadingState label="Loading the outbox">
      <Stack gap="xl">
        <Skeleton height={92} />
        <Skeleton height={260} />
        <Skeleton height={260} />
      </Stack>
    </LoadingState>
  );
}
