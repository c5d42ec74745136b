import { useLocalSearchParams } from 'expo-router';

import { SignedIn } from '@/components/account/SignedIn';
import { CatalogueEntryPage } from '@/components/members';

export default function CellTypeRoute() {
  const { cellId } = useLocalSearchParams<{ cellId: string }>();
  return (
    <SignedIn roles={['moderator', 'steward']}>
      <CatalogueEntryPage key={cellId} cellId={cellId} />
    </SignedIn>
  );
}
