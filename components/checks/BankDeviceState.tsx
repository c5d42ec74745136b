import { Banner, ButtonLink } from '@/components/ui';
import { useSession } from '@/lib/client/session';
import type { WaitingCheck } from '@/lib/client/waitingChecks';
import { formatAgo, formatDate } from '@/lib/units';

import { type TestRun, type TestStage, useTestRun } from './testRun';
import { useWaitingCheck } from './useWaitingCheck';

/** What this device holds of a bank that the server does not: a test under way, a check that waits to be sent. */
export function BankDeviceState({ bankId }: { bankId: string }) {
  const { user } = useSession();
  const { waiting } = useWaitingCheck(bankId);
  const run = useTestRun(user?.id, bankId);
  return (
    <>
      {run && run.stage !== 'prepare' && <UnderWay bankId={bankId} run={run} />}
      {waiting && <Waiting waiting={waiting} />}
    </>
  );
}

const stageWords: Record<Exclude<TestStage, 'prepare'>, string> = {
  charge: 'It is being charged full.',
  rest: 'It rests before the load goes on.',
  discharge: 'It is being discharged; somebody stays with it.',
  recharge: 'It has to be recharged at once.',
  noted: 'It is done; its readings go into the form.',
};

function UnderWay({ bankId, run }: { bankId: string; run: TestRun }) {
  const since = run.startedAt[run.stage];
  const words = run.stage === 'prepare' ? '' : stageWords[run.stage];
  return (
    <Banner
      kind="info"
      title="A test of this bank is under way"
      actions={
        <ButtonLink href={{ pathname: '/banks/[bankId]/test', params: { bankId } }} label="To the test" />
      }
    >
      {since === undefined ? words : `${words} Begun ${formatAgo(since, new Date())}.`}
    </Banner>
  );
}

function Waiting({ waiting: { bankId, check, problem } }: { waiting: WaitingCheck }) {
  const isRefused = problem !== null;
  return (
    <Banner
      kind={isRefused ? 'error' : 'info'}
      title={isRefused ? 'A check could not be sent' : 'A check waits to be sent'}
      actions={
        <ButtonLink href={{ pathname: '/banks/[bankId]/check', params: { bankId } }} label="Look at it" />
      }
    >
      {isRefused
        ? problem
        : `The check of ${formatDate(check.reading.testedOn)} is kept on this device and goes by itself when there is a connection.`}
    </Banner>
  );
}
