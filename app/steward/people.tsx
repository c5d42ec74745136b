import { SignedIn } from '@/components/account/SignedIn';
import { PeoplePage } from '@/components/members';

export default function PeopleRoute() {
  return (
    <SignedIn roles={['steward']}>
      <PeoplePage />
    </SignedIn>
  );
}
