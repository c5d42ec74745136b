import { useLocalSearchParams, useRouter } from 'expo-router';

import { CellPageView } from '@/components/cells/CellPageView';

export default function CellRoute() {
  const { cellId, band } = useLocalSearchParams<{ cellId: string; band?: string }>();
  const router = useRouter();
  return (
    <CellPageView cellId={cellId} band={band} onBandChange={(next) => router.setParams({ band: next })} />
  );
}
