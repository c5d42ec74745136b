import { useState } from 'react';

import { useLayout } from '@/components/theme';
import { Banner, Button, Heading, Link, RadioGroup, Stack, Text } from '@/components/ui';
import { ApiError } from '@/lib/client/http';
import { useSendEarlier } from '@/lib/client/earlierChecks';
import { consent } from '@/lib/contract/consent';
import type { EarlierChoice, EarlierReport } from '@/lib/contract/earlierChecks';
import { formatCount } from '@/lib/units';

interface SendPartProps {
  bankId: string;
  file: File;
  report: EarlierReport;
  onSent: (report: EarlierReport) => void;
}

const checks = (count: number) => `${formatCount(count)} ${count === 1 ? 'check' : 'checks'}`;

/** Sends what was looked at: all of it, or the good rows alone where some have a problem. */
export function SendPart({ bankId, file, report, onSent }: SendPartProps) {
  const [choice, setChoice] = useState<EarlierChoice>('allOrNothing');
  const { isPhone } = useLayout();
  const send = useSendEarlier(bankId);
  const { good, problem } = report.counts;
  const isHeld = problem > 0 && choice === 'allOrNothing';

  const submit = () => send.mutate({ file, choice, digest: report.digest }, { onSuccess: onSent });

  return (
    <Stack gap="l">
      <Heading>3. Send</Heading>
      {problem > 0 && (
        <RadioGroup
          label="What is sent"
          value={choice}
          onChange={setChoice}
          options={[
            {
              value: 'allOrNothing',
              label: 'All rows, or none',
              hint: 'Nothing yet: correct the file and choose it again above.',
            },
            {
              value: 'goodRows',
              label: `Only the good rows: ${checks(good)}`,
              hint: 'The others are handed back as a file, each with what is wrong with it.',
              disabled: good === 0,
            },
          ]}
        />
      )}
      {!isHeld && (
        <>
          <Text tone="quiet">
            {consent.before}
            <Link href={consent.address}>{consent.licence}</Link>
            {consent.after}
          </Text>
          {send.isError && (
            <Banner kind="error" title="This was not sent">
              {messageOf(send.error)}
            </Banner>
          )}
          <Button
            kind="primary"
            label={`Send ${checks(good)}`}
            onPress={submit}
            busy={send.isPending}
            wide={isPhone}
          />
        </>
      )}
    </Stack>
  );
}

// A file changed on the disk since it was chosen can't be read any more.
const messageOf = (error: Error): string =>
  error instanceof ApiError
    ? [error.message, ...Object.values(error.fields).filter((text) => text !== error.message)].join(' ')
    : 'The file could not be read again. Choose it once more.';
