import { Banner, ButtonLink } from '@/components/ui';
import { useSession } from '@/lib/client/session';

/** On the pages of moderators and stewards, while their password alone signs them in. */
export function SecondFactorNotice() {
  const { user, isDemo } = useSession();
  if (user?.secondFactor !== 'off') return null;
  return (
    <Banner
      kind="info"
      title="Signed in by password alone"
      actions={<ButtonLink href="/second-factor" label="Set up a code" />}
    >
      {isDemo
        ? 'The demo lets its accounts in without a code. In production moderators and stewards are asked for one at sign-in.'
        : 'This exchange does not require a code at sign-in. It is safer with one.'}
    </Banner>
  );
}
