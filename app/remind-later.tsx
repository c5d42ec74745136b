import { useLocalSearchParams } from 'expo-router';

import { RemindLaterPage } from '@/components/members';

export default function RemindLaterRoute() {
  const { token } = useLocalSearchParams<{ token?: string }>();
  return <RemindLaterPage key={token} token={token} />;
}
