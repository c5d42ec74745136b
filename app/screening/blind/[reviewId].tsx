import { useLocalSearchParams } from 'expo-router';

import { SignedIn } from '@/components/account/SignedIn';
import { BlindReviewPage } from '@/components/members';

export default function BlindReviewRoute() {
  const { reviewId } = useLocalSearchParams<{ reviewId: string }>();
  return (
    <SignedIn roles={['moderator', 'steward']}>
      <BlindReviewPage reviewId={reviewId} />
    </SignedIn>
  );
}
