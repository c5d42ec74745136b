import { Banner, ButtonLink } from '@/components/ui';
import type { WaitingCheck } from '@/lib/client/waitingChecks';
import { formatDate } from '@/lib/units';

import { useWaitingCheck } from './useWaitingCheck';

/** What this device holds of a bank that the server does not: a check that waits to be sent. */
export function BankDeviceState({ bankId }: { bankId: string }) {
  const { waiting } = useWaitingCheck(bankId);
  return waiting ? <Waiting waiting={waiting} /> : null;
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
