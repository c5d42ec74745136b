import { useState } from 'react';

import { Banner, Button, Dialog, Heading, Row, Stack, Text } from '@/components/ui';
import type { useSignOut } from '@/lib/client/accounts';

import { problemOf } from './problemOf';

/** Signing out, in this browser or in all. */
export function SignOutPart({ signOut }: { signOut: ReturnType<typeof useSignOut> }) {
  const [isAsking, setIsAsking] = useState(false);
  const everywhere = () => {
    setIsAsking(false);
    signOut.mutate({ everywhere: true });
  };
  return (
    <Stack gap="m">
      <Heading>Signing out</Heading>
      {signOut.error && (
        <Banner kind="error" title="You are still signed in">
          {problemOf(signOut.error)}
        </Banner>
      )}
      <Row>
        <Button
          label="Sign out here"
          busy={signOut.isPending}
          onPress={() => signOut.mutate({ everywhere: false })}
        />
        <Button
          kind="danger"
          label="Sign out everywhere"
          disabled={signOut.isPending}
          onPress={() => setIsAsking(true)}
        />
      </Row>
      <Dialog
        isOpen={isAsking}
        onClose={() => setIsAsking(false)}
        title="Sign out everywhere?"
        actions={
          <>
            <Button label="Stay signed in" onPress={() => setIsAsking(false)} />
            <Button kind="danger" label="Sign out everywhere" onPress={everywhere} />
          </>
        }
      >
        <Text>
          Every browser and phone that is signed in with this account will have to sign in again. For a device
          you have lost, choose a new password as well.
        </Text>
      </Dialog>
    </Stack>
  );
}
