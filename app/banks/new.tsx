import { SignedIn } from '@/components/account/SignedIn';
import { NewBankPage } from '@/components/members';

export default function NewBankRoute() {
  return (
    <SignedIn>
      <NewBankPage />
    </SignedIn>
  );
}
