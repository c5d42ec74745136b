import { useLocalSearchParams } from 'expo-router';

import { UnsubscribePage } from '@/components/members';

export default function UnsubscribeRoute() {
  const { token } = useLocalSearchParams<{ token?: string }>();
  return <UnsubscribePage key={token} token={token} />;
}
