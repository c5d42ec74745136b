import type { Href } from 'expo-router';

import { Heading, Link, Panel, Quiet, Stack, Text } from '@/components/ui';
import type { Outbox } from '@/lib/contract/accounts';
import { formatInstant } from '@/lib/units';

import { mailParagraphs } from './mailParagraphs';

const stateWords = {
  queued: 'waits to be handed over',
  sent: 'handed over',
  failed: 'could not be handed over',
};

/** One kept mail, as its reader would see it; its links open here. */
export function OutboxMail({ mail }: { mail: Outbox['messages'][number] }) {
  return (
    <Panel>
      <Stack gap="xs">
        <Heading size="lead">{mail.subject}</Heading>
        <Quiet>{`To ${mail.to}, ${formatInstant(mail.createdAt)}, ${stateWords[mail.state]}`}</Quiet>
      </Stack>
      {mailParagraphs(mail.text).map((parts, index) => (
        <Text key={index}>
          {parts.map(({ text, path }, part) =>
            path ? (
              <Link key={part} href={path as Href}>
                {text}
              </Link>
            ) : (
              text
            ),
          )}
        </Text>
      ))}
    </Panel>
  );
}
