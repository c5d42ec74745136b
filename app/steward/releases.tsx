import { SignedIn } from '@/components/account/SignedIn';
import { ReleasesPage } from '@/components/members';

export default function ReleasesRoute() {
  return (
    <SignedIn roles={['steward']}>
      <ReleasesPage />
    </SignedIn>
  );
}
