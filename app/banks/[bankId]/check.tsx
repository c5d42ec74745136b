import { useLocalSearchParams } from 'expo-router';

import { SignedIn } from '@/components/account/SignedIn';
import { CheckFormPage } from '@/components/members';

export default function CheckFormRoute() {
  const { bankId, correct } = useLocalSearchParams<{ bankId: string; correct?: string }>();
  return (
    <SignedIn>
      <CheckFormPage bankId={bankId} correct={correct} />
    </SignedIn>
  );
}
