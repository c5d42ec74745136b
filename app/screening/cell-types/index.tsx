import { SignedIn } from '@/components/account/SignedIn';
import { CatalogueListPage } from '@/components/members';

export default function CellTypesRoute() {
  return (
    <SignedIn roles={['moderator', 'steward']}>
      <CatalogueListPage />
    </SignedIn>
  );
}
