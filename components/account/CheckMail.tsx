import type { ReactNode } from 'react';

import { Banner, Button, ButtonLink, Page, PageHead, Row, Text } from '@/components/ui';
import { useSession } from '@/lib/client/session';

interface CheckMailProps {
  email: string;
  /** What the mail is good for. */
  children: ReactNode;
  actions?: ReactNode;
  onOtherAddress: () => void;
}

/** After a request that is answered by mail, whether or not the address has an account. */
export function CheckMail({ email, children, actions, onOtherAddress }: CheckMailProps) {
  const { isDemo } = useSession();
  return (
    <Page narrow>
      <PageHead title="Check your mail" sub={`A mail for ${email} is on its way.`} />
      <Text>{children}</Text>
      <Text>Nothing there after a few minutes? Look among the unwanted mail, and at the address above.</Text>
      {isDemo && (
        <Banner
          kind="info"
          title="This demo sends no mail"
          actions={<ButtonLink href="/outbox" label="Open the outbox" />}
        >
          It keeps what it would have sent in its outbox.
        </Banner>
      )}
      <Row>
        {actions}
        <Button kind="quiet" label="Use another address" onPress={onOtherAddress} />
      </Row>
    </Page>
  );
}
