import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { SignedIn } from '@/components/account/SignedIn';
import { QueryPage } from '@/components/QueryPage';
import {
  Banner,
  ButtonLink,
  LoadingState,
  Page,
  PageHead,
  Skeleton,
  Stack,
  Steps,
  Text,
} from '@/components/ui';
import { secondFactorQuery } from '@/lib/client/secondFactor';
import type { SecondFactorOffer } from '@/lib/contract/secondFactor';

import { ConfirmStep } from './ConfirmStep';
import { PasswordStep } from './PasswordStep';
import { RecoveryCodeList } from './RecoveryCodeList';

const title = 'A code at sign-in';
const back = { href: '/settings', label: 'Account' } as const;
const steps = ['Password', 'App', 'Recovery codes'];

/** Sets up the second step of signing in: the password, the app with a first code, the recovery codes. */
export function SecondFactorPage() {
  return (
    <SignedIn>
      <SetUp />
    </SignedIn>
  );
}

function SetUp() {
  const query = useQuery(secondFactorQuery);
  const [offer, setOffer] = useState<SecondFactorOffer | null>(null);
  const [codes, setCodes] = useState<readonly string[] | null>(null);
  const current = codes ? 2 : offer ? 1 : 0;
  return (
    <QueryPage query={query} title={title} back={back} narrow loading={<FormSkeleton />}>
      {({ isOn }) => (
        <Page narrow>
          <PageHead
            title={title}
            back={back}
            sub="After the password, signing in asks for six digits that an app on your phone makes anew every half minute. Who learns your password alone can't sign in."
          />
          {isOn && !codes ? (
            <Banner
              kind="done"
              title="It is set up"
              actions={<ButtonLink href="/settings" label="To the account" />}
            >
              Signing in asks for a code already.
            </Banner>
          ) : (
            <Stack gap="xl">
              <Steps steps={steps} current={current} />
              {!offer && <PasswordStep onOffer={setOffer} />}
              {offer && !codes && <ConfirmStep offer={offer} onCodes={setCodes} />}
              {codes && (
                <>
                  <Text>From now on signing in asks for a code. Other browsers have been signed out.</Text>
                  <RecoveryCodeList codes={codes} />
                  <ButtonLink kind="primary" href="/settings" label="I have kept them" />
                </>
              )}
            </Stack>
          )}
        </Page>
      )}
    </QueryPage>
  );
}

function FormSkeleton() {
  return (
    <LoadingState label="Looking up your sign-in">
      <Skeleton height={48} />
      <Skeleton height={116} />
    </LoadingState>
  );
}
