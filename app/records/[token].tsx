import { useLocalSearchParams } from 'expo-router';

import { SharedRecordPage } from '@/components/members';

export default function RecordRoute() {
  const { token } = useLocalSearchParams<{ token: string }>();
  return <SharedRecordPage key={token} token={token} />;
}
