import { useLocalSearchParams } from 'expo-router';

import { SignedIn } from '@/components/account/SignedIn';
import { EarlierChecksPage } from '@/components/members';

export default function EarlierChecksRoute() {
  const { bankId } = useLocalSearchParams<{ bankId?: string }>();
  return (
    <SignedIn>
      <EarlierChecksPage bankId={bankId} />
    </SignedIn>
  );
}
