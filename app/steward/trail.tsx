import { SignedIn } from '@/components/account/SignedIn';
import { TrailPage } from '@/components/members';

export default function TrailRoute() {
  return (
    <SignedIn roles={['steward']}>
      <TrailPage />
    </SignedIn>
  );
}
