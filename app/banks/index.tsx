import { SignedIn } from '@/components/account/SignedIn';
import { BankListPage } from '@/components/members';

export default function BanksRoute() {
  return (
    <SignedIn>
      <BankListPage />
    </SignedIn>
  );
}
