import { Banner, Button, ButtonLink, Heading, Page, PageHead, Stack, Text } from '@/components/ui';
import { useVerify } from '@/lib/client/accounts';
import { ApiError } from '@/lib/client/http';

import { problemOf } from './problemOf';
import { ResendForm } from './ResendForm';

/**
 * Confirms an address by the token of a mail. It waits for a press, as programs that look at links in mails would use
 * the token up.
 */
export function VerifyPage({ token }: { token: string | undefined }) {
  const verify = useVerify();
  if (verify.isSuccess)
    return (
      <Page narrow>
        <PageHead title="Your address is confirmed" sub="The account is open. Sign in with your password." />
        <ButtonLink kind="primary" href="/sign-in" label="Sign in" />
      </Page>
    );
  const isSpent = verify.error instanceof ApiError && verify.error.code === 'gone';
  return (
    <Page narrow>
      <PageHead title="Confirm your address" sub="The last step of opening an account." />
      {token && !isSpent && (
        <Stack gap="l">
          <Text>Press once to confirm that the address this link was mailed to is yours.</Text>
          {verify.error && (
            <Banner kind="error" title="That did not work">
              {problemOf(verify.error)}
            </Banner>
          )}
          <Button
            kind="primary"
            wide
            label="Confirm the address"
            busy={verify.isPending}
            onPress={() => verify.mutate({ token })}
          />
        </Stack>
      )}
      {isSpent && (
        <Banner
          kind="caution"
          title="This link has been used or has run out"
          actions={<ButtonLink href="/sign-in" label="Sign in" />}
        >
          If you confirmed the address with it before, you can sign in.
        </Banner>
      )}
      {!token && (
        <Banner kind="caution" title="The link is not complete">
          Open it from the mail, or copy all of it.
        </Banner>
      )}
      {(isSpent || !token) && (
        <Stack gap="l">
          <Heading>Have another link mailed</Heading>
          <ResendForm />
        </Stack>
      )}
    </Page>
  );
}
