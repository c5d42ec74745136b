import { SignedIn } from '@/components/account/SignedIn';
import { AgreementPage } from '@/components/members';

export default function AgreementRoute() {
  return (
    <SignedIn roles={['moderator', 'steward']}>
      <AgreementPage />
    </SignedIn>
  );
}
