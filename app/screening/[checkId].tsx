import { useLocalSearchParams } from 'expo-router';

import { SignedIn } from '@/components/account/SignedIn';
import { SubmissionPage } from '@/components/members';

export default function SubmissionRoute() {
  const { checkId } = useLocalSearchParams<{ checkId: string }>();
  return (
    <SignedIn roles={['moderator', 'steward']}>
      <SubmissionPage checkId={checkId} />
    </SignedIn>
  );
}
