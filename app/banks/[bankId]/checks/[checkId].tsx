import { useLocalSearchParams } from 'expo-router';

import { SignedIn } from '@/components/account/SignedIn';
import { CheckPage } from '@/components/members';

export default function CheckRoute() {
  const { bankId, checkId } = useLocalSearchParams<{ bankId: string; checkId: string }>();
  return (
    <SignedIn>
      <CheckPage bankId={bankId} checkId={checkId} />
    </SignedIn>
  );
}
