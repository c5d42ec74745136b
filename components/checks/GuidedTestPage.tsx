import { useQuery } from '@tanstack/react-query';
import { useRouter } from 'expo-router';
import { useEffect, useState } from 'react';

import { FormSkeleton } from '@/components/banks/FormSkeleton';
import { QueryPage } from '@/components/QueryPage';
import { ActionBar, Button, Page, PageHead, Row, Stack, Steps, useToast } from '@/components/ui';
import { bankQuery } from '@/lib/client/banks';
import { useSession } from '@/lib/client/session';
import type { Bank } from '@/lib/contract/banks';

import { guidedStages } from './GuidedStages';
import { readyToRing } from './ring';
import { forgetTestRun, newTestRun, type TestRun, testStages, useTestRun, writeTestRun } from './testRun';

/** Goes through a capacity check at the bank, stage by stage, and on into the form. */
export function GuidedTestPage({ bankId }: { bankId: string }) {
  const bank = useQuery(bankQuery(bankId));
  return (
    <QueryPage
      query={bank}
      title="Run the test"
      back={{ href: { pathname: '/banks/[bankId]', params: { bankId } }, label: 'The bank' }}
      narrow
      loading={<FormSkeleton label="Loading the bank" />}
    >
      {(loaded) => <GuidedTest bank={loaded} />}
    </QueryPage>
  );
}

function GuidedTest({ bank }: { bank: Bank }) {
  const { user } = useSession();
  const router = useRouter();
  const run = useTestRun(user?.id, bank.id) ?? newTestRun;
  const change = useChange(user?.id, bank.id);
  const [isAwareMissing, setIsAwareMissing] = useState(false);
  const index = testStages.indexOf(run.stage);
  const { title, lead, next, Body } = guidedStages[run.stage];
  const params = { bankId: bank.id };

  useEffect(() => {
    // In braces: browsers of today answer a promise, which is no clean-up.
    window.scrollTo(0, 0);
  }, [run.stage]);

  const goOn = () => {
    readyToRing();
    if (!run.isAware) return setIsAwareMissing(true);
    const following = testStages[index + 1];
    if (following === undefined) return router.push({ pathname: '/banks/[bankId]/check', params });
    const startedAt = { ...run.startedAt, [following]: new Date().toISOString() };
    change({ ...run, stage: following, startedAt });
  };
  // The stage gone back to goes on from when it began.
  const goBack = () => change({ ...run, stage: testStages[index - 1] ?? 'prepare' });

  return (
    <Page narrow>
      <PageHead
        key={run.stage}
        title={title}
        documentTitle={`${title}, ${bank.name}`}
        back={{ href: { pathname: '/banks/[bankId]', params }, label: bank.name }}
        above={<Steps steps={testStages.map((stage) => guidedStages[stage].title)} current={index} />}
        sub={lead}
        isRuled={false}
      />
      <Stack gap="xl">
        <Body
          bank={bank}
          run={run}
          isAwareMissing={isAwareMissing && !run.isAware}
          onAware={(isAware) => change({ ...run, isAware })}
          onNote={(field, text) => change({ ...run, readings: { ...run.readings, [field]: text } })}
        />
        {index > 0 && (
          <Row>
            <Button kind="quiet" icon="back" label="One step back" onPress={goBack} />
            <Button
              kind="quiet"
              label="Give this test up"
              onPress={() => user && forgetTestRun(user.id, bank.id)}
            />
          </Row>
        )}
      </Stack>
      <ActionBar>
        <Button kind="primary" label={next} onPress={goOn} wide />
      </ActionBar>
    </Page>
  );
}

function useChange(userId: string | undefined, bankId: string) {
  const toast = useToast();
  return (run: TestRun) => {
    const isKept = userId !== undefined && writeTestRun(userId, bankId, run);
    if (!isKept)
      toast({ text: 'This browser keeps nothing for the page, so the test can not be followed here.' });
  };
}
