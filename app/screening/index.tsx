import { ScreeningPage } from '@/components/moderation/ScreeningPage';
import { SignedIn } from '@/components/account/SignedIn';

export default function ScreeningRoute() {
  return (
    <SignedIn roles={['moderator', 'steward']}>
      <ScreeningPage />
    </SignedIn>
  );
}
