import { useLocalSearchParams } from 'expo-router';

import { ConfirmAddressPage } from '@/components/members';

export default function ConfirmAddressRoute() {
  const { token } = useLocalSearchParams<{ token?: string }>();
  return <ConfirmAddressPage key={token} token={token} />;
}
