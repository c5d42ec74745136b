import { useLocalSearchParams, useRouter } from 'expo-router';
import { useCallback } from 'react';

import { CellPageView } from '@/components/cells/CellPageView';

export default function CellRoute() {
  const { cellId, band } = useLocalSearchParams<{ cellId: string; band?: string }>();
  const { setParams } = useRouter();
  const setBand = useCallback((next: string | undefined) => setParams({ band: next }), [setParams]);
  return <CellPageView cellId={cellId} band={band} onBandChange={setBand} />;
}
