import { useState } from 'react';

import { useLayout } from '@/components/theme';
import { ActionBar, Banner, Button, ButtonLink, Dialog, Text, useToast } from '@/components/ui';
import { useWithdrawCheck } from '@/lib/client/checks';
import type { Check } from '@/lib/contract/checks';

import { openStates } from './checkWords';

/** What its owner can still do with a check. */
export function CheckActions({ check }: { check: Check }) {
  const { isPhone } = useLayout();
  const [isAsking, setIsAsking] = useState(false);
  const isOpen = openStates.has(check.state);
  if (!isOpen && check.state !== 'approved') return null;
  const correct = isOpen && (
    <ButtonLink
      kind="primary"
      href={{ pathname: '/banks/[bankId]/check', params: { bankId: check.bankId, correct: check.id } }}
      label="Correct the figures"
      wide={isPhone}
    />
  );
  const withdraw = <Button kind="danger" label="Withdraw this check" onPress={() => setIsAsking(true)} />;
  return (
    <>
      {/* At the thumb there is room for what is done often; taking a check out is not. */}
      {isPhone && withdraw}
      {(correct || !isPhone) && (
        <ActionBar stays>
          {correct}
          {!isPhone && withdraw}
        </ActionBar>
      )}
      {isAsking && <WithdrawDialog check={check} onClose={() => setIsAsking(false)} />}
    </>
  );
}

function WithdrawDialog({ check, onClose }: { check: Check; onClose: () => void }) {
  const withdraw = useWithdrawCheck(check.id);
  const toast = useToast();
  const send = () =>
    withdraw.mutate(
      { version: check.version },
      {
        onSuccess: () => {
          toast({ text: 'The check is withdrawn.' });
          onClose();
        },
      },
    );
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Withdraw this check?"
      actions={
        <>
          <Button label="Keep it" onPress={onClose} />
          <Button kind="danger" label="Withdraw" onPress={send} busy={withdraw.isPending} />
        </>
      }
    >
      <Text>
        {check.state === 'approved'
          ? 'It leaves the pool with the next fit, and published figures with the next step. The trail keeps that it was there. Withdrawing can not be undone.'
          : 'No moderator looks at it any more. You can send a check of the same day again as a new one. Withdrawing can not be undone.'}
      </Text>
      {withdraw.isError && (
        <Banner kind="error" title="Not withdrawn">
          {withdraw.error.message}
        </Banner>
      )}
    </Dialog>
  );
}
