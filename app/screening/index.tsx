import { ScreeningPage } from '@/components/members';
import { SignedIn } from '@/components/account/SignedIn';

export default function ScreeningRoute() {
  return (
    <SignedIn roles={['moderator', 'steward']}>
      <ScreeningPage />
    </SignedIn>
  );
}
