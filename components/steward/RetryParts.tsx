import { Button, Heading, Stack, Table, Text, useToast } from '@/components/ui';
import { useRetry } from '@/lib/client/steward';
import type { Health } from '@/lib/contract/steward';
import { formatCount, formatInstant } from '@/lib/units';

import { jobWord } from './healthWords';

/** Tries one again, and says so. */
function useRetryButton(what: 'jobs' | 'mails') {
  const toast = useToast();
  const retry = useRetry(what);
  return function retryButton(id: string, description: string) {
    return (
      <Button
        label="Try again"
        description={`Try again: ${description}`}
        busy={retry.isPending && retry.variables === id}
        onPress={() =>
          retry.mutate(id, {
            onSuccess: () => toast({ text: 'It is being tried again.' }),
            onError: (error) => toast({ text: error.message }),
          })
        }
      />
    );
  };
}

/** Jobs that ran out of attempts. */
export function JobsPart({ jobs: { waiting, failed, failedCount } }: { jobs: Health['jobs'] }) {
  const retryButton = useRetryButton('jobs');
  return (
    <Stack gap="m">
      <Heading>Failed jobs</Heading>
      <Text>
        {`${formatCount(failedCount)} failed after all attempts; ${formatCount(waiting)} wait for their time or run.`}
      </Text>
      {failed.length > 0 && (
        <Table
          caption="Failed jobs"
          rows={failed}
          rowKey={({ id }) => id}
          columns={[
            { key: 'kind', title: 'Job', cell: ({ kind }) => jobWord(kind) },
            { key: 'error', title: 'What went wrong', cell: ({ error }) => error },
            { key: 'failedAt', title: 'When', cell: ({ failedAt }) => formatInstant(failedAt) },
            { key: 'attempts', title: 'Attempts', figures: true, cell: ({ attempts }) => String(attempts) },
            { key: 'retry', title: 'Act', cell: ({ id, kind }) => retryButton(id, jobWord(kind)) },
          ]}
        />
      )}
    </Stack>
  );
}

/** Mails that were refused, or have waited long. */
export function MailsPart({ mails: { undelivered, undeliveredCount } }: { mails: Health['mails'] }) {
  const retryButton = useRetryButton('mails');
  return (
    <Stack gap="m">
      <Heading>Undelivered mails</Heading>
      <Text>
        {undeliveredCount === 0
          ? 'None: every mail older than ten minutes has been handed over.'
          : `${formatCount(undeliveredCount)} could not be handed over. To whom they go is not shown.`}
      </Text>
      {undelivered.length > 0 && (
        <Table
          caption="Undelivered mails"
          rows={undelivered}
          rowKey={({ id }) => id}
          columns={[
            { key: 'subject', title: 'Subject', cell: ({ subject }) => subject },
            {
              key: 'state',
              title: 'State',
              cell: ({ state }) => (state === 'failed' ? 'refused' : 'waits'),
            },
            { key: 'problem', title: 'What went wrong', cell: ({ problem }) => problem },
            { key: 'createdAt', title: 'Written', cell: ({ createdAt }) => formatInstant(createdAt) },
            { key: 'retry', title: 'Act', cell: ({ id, subject }) => retryButton(id, subject) },
          ]}
        />
      )}
    </Stack>
  );
}
