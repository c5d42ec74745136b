import { type ThemeChoice, useTheme } from '@/components/theme';
import { ButtonLink, Divider, Heading, Page, PageHead, Quiet, Segmented, Stack } from '@/components/ui';
import { useSignOut } from '@/lib/client/accounts';
import { useDeleteAccount } from '@/lib/client/ownData';
import { useSession } from '@/lib/client/session';

import { SecondFactorPart } from '@/components/secondFactor/SecondFactorPart';

import { DeletePart } from './DeletePart';
import { NoticesPart } from './NoticesPart';
import { OwnDataPart } from './OwnDataPart';
import { SignedIn } from './SignedIn';
import { SignInPart } from './SignInPart';
import { SignOutPart } from './SignOutPart';

const themes = [
  { value: 'system', label: 'As the device' },
  { value: 'light', label: 'Light' },
  { value: 'dark', label: 'Dark' },
] as const satisfies readonly { value: ThemeChoice; label: string }[];

/** One's account: signing in, mails, how the pages look, one's data, and leaving. */
export function SettingsPage() {
  const { user } = useSession();
  const signOut = useSignOut();
  const deletion = useDeleteAccount();
  if (deletion.isSuccess) return <Deleted areChecksLeft={deletion.variables.checks === 'leave'} />;
  if (signOut.isSuccess) return <SignedOut isEverywhere={signOut.variables.everywhere === true} />;
  return (
    <SignedIn>
      <Page narrow>
        <PageHead title="Account" />
        {user && <SignInPart user={user} />}
        <SecondFactorPart />
        <Divider />
        <SignOutPart signOut={signOut} />
        <Divider />
        <NoticesPart />
        <Divider />
        <AppearancePart />
        <Divider />
        <OwnDataPart />
        {user && <DeletePart user={user} deletion={deletion} />}
      </Page>
    </SignedIn>
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
            ? 'Here and in every other browser.'
            : 'In this browser. Drafts you kept on this device are still on it.'
        }
      />
      <ButtonLink kind="primary" href="/sign-in" label="Sign in" />
    </Page>
  );
}

function Deleted({ areChecksLeft }: { areChecksLeft: boolean }) {
  return (
    <Page narrow>
      <PageHead
        title="Your account is deleted"
        sub={
          areChecksLeft
            ? 'Nothing of you is left here. Your checks go on counting without a name. Thank you for measuring.'
            : 'Nothing of you is left here, and your checks are withdrawn. Thank you for having measured.'
        }
      />
      <ButtonLink href="/" label="To the lifetimes" />
    </Page>
  );
}
