import { useLocalSearchParams } from 'expo-router';

import { SignedIn } from '@/components/account/SignedIn';
import { BankPage } from '@/components/members';

export default function BankRoute() {
  const { bankId } = useLocalSearchParams<{ bankId: string }>();
  return (
    <SignedIn>
      <BankPage bankId={bankId} />
    </SignedIn>
  );
}
