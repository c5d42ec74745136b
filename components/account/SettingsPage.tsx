import {
  ButtonLink,
  DefinitionList,
  Heading,
  Link,
  Page,
  PageHead,
  Quiet,
  Segmented,
  Stack,
} from '@/components/ui';
import { type ThemeChoice, useTheme } from '@/components/theme';
import { useSignOut } from '@/lib/client/accounts';
import { useSession } from '@/lib/client/session';
import type { Role } from '@/lib/contract/accounts';

import { SignedIn } from './SignedIn';
import { SignOutPart } from './SignOutPart';

const roleWords: Record<Role, string> = {
  owner: 'Owner of a bank',
  moderator: 'Moderator',
  steward: 'Steward',
};

const themes = [
  { value: 'system', label: 'As the device' },
  { value: 'light', label: 'Light' },
  { value: 'dark', label: 'Dark' },
] as const satisfies readonly { value: ThemeChoice; label: string }[];

/** One's account: who one is here, how the pages look, and signing out. */
export function SettingsPage() {
  const signOut = useSignOut();
  if (signOut.isSuccess) return <SignedOut isEverywhere={signOut.variables.everywhere === true} />;
  return (
    <SignedIn>
      <Page narrow>
        <PageHead title="Account" />
        <AccountPart />
        <AppearancePart />
        <SignOutPart signOut={signOut} />
      </Page>
    </SignedIn>
  );
}

function AccountPart() {
  const { user } = useSession();
  if (!user) return null;
  return (
    <Stack gap="m">
      <Heading>Who you are here</Heading>
      <DefinitionList
        items={[
          { label: 'E-mail address', value: user.email },
          { label: 'Role', value: roleWords[user.role] },
        ]}
      />
      <Link href={{ pathname: '/reset', params: { email: user.email } }}>Choose a new password</Link>
    </Stack>
  );
}

function AppearancePart() {
  const { choice, setChoice } = useTheme();
  return (
    <Stack gap="m">
      <Heading>Appearance</Heading>
      <Segmented label="Appearance" value={choice} onChange={setChoice} options={themes} wide />
      <Quiet>Kept in this browser.</Quiet>
    </Stack>
  );
}

function SignedOut({ isEverywhere }: { isEverywhere: boolean }) {
  return (
    <Page narrow>
      <PageHead
        title="You are signed out"
        sub={
          isEverywhere
            ? 'Here at once, and in every other browser within 15 minutes.'
            : 'In this browser. Drafts you kept on this device are still on it.'
        }
      />
      <ButtonLink kind="primary" href="/sign-in" label="Sign in" />
    </Page>
  );
}
