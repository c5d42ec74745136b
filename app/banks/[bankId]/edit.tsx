import { useLocalSearchParams } from 'expo-router';

import { SignedIn } from '@/components/account/SignedIn';
import { EditBankPage } from '@/components/members';

export default function EditBankRoute() {
  const { bankId } = useLocalSearchParams<{ bankId: string }>();
  return (
    <SignedIn>
      <EditBankPage bankId={bankId} />
    </SignedIn>
  );
}
