import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';

import { Banner, Button, DefinitionList, Page, PageHead, Quiet, Row, Stack } from '@/components/ui';
import { useSession } from '@/lib/client/session';
import { takeBackWaiting, type WaitingCheck } from '@/lib/client/waitingChecks';
import type { Bank } from '@/lib/contract/banks';
import { formatDate, formatDuration, formatQuantity } from '@/lib/units';

interface WaitingCheckPageProps {
  bank: Bank;
  waiting: WaitingCheck;
}

/** In place of the form while a check waits to be sent: it can be taken back into the form, and is then not sent. */
export function WaitingCheckPage({ bank, waiting: { check, hasPhoto, problem } }: WaitingCheckPageProps) {
  const client = useQueryClient();
  const { user } = useSession();
  const [isTaking, setIsTaking] = useState(false);
  const takeBack = () => {
    if (!user) return;
    setIsTaking(true);
    void takeBackWaiting(client, user.id, bank.id);
  };
  const { testedOn, capacityAh, durationS } = check.reading;
  return (
    <Page narrow>
      <PageHead
        title={problem === null ? 'A check waits to be sent' : 'A check could not be sent'}
        back={{ href: { pathname: '/banks/[bankId]', params: { bankId: bank.id } }, label: bank.name }}
      />
      <Stack gap="l">
        {problem === null ? (
          <Banner kind="info" title="Waiting for a connection">
            It is kept on this device under your account and goes by itself, once, when there is a connection
            and these pages are open.
          </Banner>
        ) : (
          <Banner kind="error" title="The exchange would not take it as it is">
            {problem}
          </Banner>
        )}
        <DefinitionList
          items={[
            { label: 'Tested', value: formatDate(testedOn) },
            { label: 'Charge', value: formatQuantity(capacityAh, 'Ah') },
            { label: 'Duration', value: formatDuration(durationS) },
            { label: 'Photo of the meter', value: hasPhoto || check.photoId ? 'goes with it' : 'none' },
          ]}
        />
        <Row>
          <Button
            kind={problem === null ? 'secondary' : 'primary'}
            label="Take it back and change it"
            busy={isTaking}
            onPress={takeBack}
          />
        </Row>
        <Quiet>Taken back, it is a draft again, with everything in its fields.</Quiet>
      </Stack>
    </Page>
  );
}
