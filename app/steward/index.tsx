import { SignedIn } from '@/components/account/SignedIn';
import { HealthPage } from '@/components/members';

export default function StewardRoute() {
  return (
    <SignedIn roles={['steward']}>
      <HealthPage />
    </SignedIn>
  );
}
