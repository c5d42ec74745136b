import { useLocalSearchParams } from 'expo-router';

import { VerifyPage } from '@/components/members';

export default function VerifyRoute() {
  const { token } = useLocalSearchParams<{ token?: string }>();
  return <VerifyPage key={token} token={token} />;
}
