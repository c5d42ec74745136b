import { useLocalSearchParams } from 'expo-router';

import { SignedIn } from '@/components/account/SignedIn';
import { GuidedTestPage } from '@/components/members';

export default function GuidedTestRoute() {
  const { bankId } = useLocalSearchParams<{ bankId: string }>();
  return (
    <SignedIn>
      <GuidedTestPage bankId={bankId} />
    </SignedIn>
  );
}
