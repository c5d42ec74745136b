import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { QueryPage } from '@/components/QueryPage';
import { QueryView } from '@/components/QueryView';
import { AnswerForm } from '@/components/checks/AnswerForm';
import { BankDeviceState } from '@/components/checks/BankDeviceState';
import { RecordsPanel } from '@/components/records/RecordsPanel';
import {
  ActionBar,
  Banner,
  Beside,
  ButtonLink,
  LoadingState,
  Page,
  PageHead,
  Skeleton,
  SkeletonRows,
  Stack,
} from '@/components/ui';
import { useLayout } from '@/components/theme';
import { bankQuery } from '@/lib/client/banks';
import { bankChecksQuery } from '@/lib/client/checks';
import { type Bank, endingOf } from '@/lib/contract/banks';

import { BankChecks } from './BankChecks';
import { standingDangers } from './bankDangers';
import { BankEnded } from './BankEnded';
import { BankEvents } from './BankEvents';
import { BankFactList } from './BankFactList';
import { bankLine } from './bankWords';
import { ReminderPanel } from './ReminderPanel';

/** One bank: its checks over the years, what it is, what happened to it. */
export function BankPage({ bankId }: { bankId: string }) {
  const query = useQuery(bankQuery(bankId));
  return (
    <QueryPage
      query={query}
      title="Bank"
      back={{ href: '/banks', label: 'My banks' }}
      loading={<ChecksSkeleton label="Loading the bank" />}
    >
      {(bank) => <LoadedBank bank={bank} />}
    </QueryPage>
  );
}

function LoadedBank({ bank }: { bank: Bank }) {
  const query = useQuery(bankChecksQuery(bank.id));
  const { isPhone } = useLayout();
  const params = { bankId: bank.id };
  const [hasJustEnded, setHasJustEnded] = useState(false);
  const ending = endingOf(bank.events);
  const addCheck = { pathname: '/banks/[bankId]/check', params } as const;
  return (
    <Page>
      <PageHead
        title={bank.name}
        back={{ href: '/banks', label: 'My banks' }}
        sub={bankLine(bank)}
        actions={
          <>
            <ButtonLink href={{ pathname: '/banks/[bankId]/edit', params }} label="Change" />
            {!ending && (
              <ButtonLink href={{ pathname: '/banks/[bankId]/test', params }} label="Run the test" />
            )}
            {!isPhone && !ending && <ButtonLink kind="primary" href={addCheck} label="Add a check" />}
          </>
        }
      />
      {ending && <BankEnded bank={bank} ending={ending} isNew={hasJustEnded} />}
      {standingDangers(bank.events).map(({ title, text }) => (
        <Banner key={title} kind="caution" title={title}>
          {text}
        </Banner>
      ))}
      <BankDeviceState bankId={bank.id} />
      <Beside
        aside={
          <Stack gap="xl">
            <ReminderPanel bankId={bank.id} />
            {query.data && (
              <RecordsPanel
                bankId={bank.id}
                hasApproved={query.data.some(({ state }) => state === 'approved')}
              />
            )}
            <BankFactList bank={bank} />
            <BankEvents bank={bank} onEnded={() => setHasJustEnded(true)} />
          </Stack>
        }
      >
        <QueryView query={query} loading={<ChecksSkeleton label="Loading the checks" />}>
          {(checks) => (
            <>
              {checks
                .filter(({ state }) => state === 'sentBack')
                .map((check) => (
                  <AnswerForm key={`${check.id}${check.version}`} check={check} />
                ))}
              <BankChecks bank={bank} checks={checks} />
            </>
          )}
        </QueryView>
      </Beside>
      {isPhone && !ending && (
        <ActionBar stays>
          <ButtonLink kind="primary" href={addCheck} label="Add a check" wide />
        </ActionBar>
      )}
    </Page>
  );
}

function ChecksSkeleton({ label }: { label: string }) {
  return (
    <LoadingState label={label}>
      <Skeleton height={380} />
      <SkeletonRows count={4} height={44} />
    </LoadingState>
  );
}
