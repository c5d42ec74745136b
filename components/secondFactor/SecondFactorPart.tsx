import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';

import { AccountForm } from '@/components/account/AccountForm';
import { PasswordField } from '@/components/account/PasswordField';
import { useAccountForm } from '@/components/account/useAccountForm';
import { QueryView } from '@/components/QueryView';
import {
  Banner,
  ButtonLink,
  Disclosure,
  Heading,
  LoadingState,
  Quiet,
  SkeletonRows,
  Stack,
  Text,
  useToast,
} from '@/components/ui';
import { secondFactorQuery, useRenewRecoveryCodes, useTurnOffSecondFactor } from '@/lib/client/secondFactor';
import { passwordAndCodeRequestSchema, type SecondFactor } from '@/lib/contract/secondFactor';
import { formatInstant } from '@/lib/units';

import { CodeField } from './CodeField';
import { RecoveryCodeList } from './RecoveryCodeList';

/** Whether signing in asks for a code, and the way to change it. */
export function SecondFactorPart() {
  const query = useQuery(secondFactorQuery);
  return (
    <Stack gap="m">
      <Heading>A code at sign-in</Heading>
      <QueryView
        query={query}
        loading={
          <LoadingState label="Looking up whether a code is asked">
            <SkeletonRows count={2} height={32} />
          </LoadingState>
        }
      >
        {(factor) => (factor.isOn ? <On factor={factor} /> : <Off isRequired={factor.isRequired} />)}
      </QueryView>
    </Stack>
  );
}

function Off({ isRequired }: { isRequired: boolean }) {
  return (
    <>
      {isRequired && (
        <Banner kind="caution" title="Needed for your work here">
          Moderators and stewards sign in with a code too. Until it is set up the pages of your role stay
          shut.
        </Banner>
      )}
      <Text>The password alone signs you in. A code of an app on your phone can be asked for after it.</Text>
      <ButtonLink href="/second-factor" label="Set up the code" />
    </>
  );
}

const noProof = { currentPassword: '', code: '' };

function On({ factor: { since, recoveryCodesLeft } }: { factor: SecondFactor }) {
  const left =
    recoveryCodesLeft === 1 ? '1 recovery code is left.' : `${recoveryCodesLeft} recovery codes are left.`;
  return (
    <>
      <Text>{`Signing in asks for a code${since ? ` since ${formatInstant(since)}` : ''}. ${left}`}</Text>
      {recoveryCodesLeft < 3 && (
        <Banner kind="caution" title="Few recovery codes are left">
          Make fresh ones before you need them.
        </Banner>
      )}
      <Disclosure label="Make fresh recovery codes">
        <FreshCodes />
      </Disclosure>
      <Disclosure label="Turn the code off">
        <TurnOff />
      </Disclosure>
    </>
  );
}

function FreshCodes() {
  const [codes, setCodes] = useState<readonly string[] | null>(null);
  const renew = useRenewRecoveryCodes();
  const { control, submit } = useAccountForm(passwordAndCodeRequestSchema, noProof, async (request) =>
    setCodes((await renew.mutateAsync(request)).recoveryCodes),
  );
  if (codes) return <RecoveryCodeList codes={codes} />;
  return (
    <Stack gap="l">
      <Quiet>The ten you have now are void from then on.</Quiet>
      <AccountForm control={control} label="Make fresh codes" onSubmit={submit}>
        <ProofFields control={control} />
      </AccountForm>
    </Stack>
  );
}

function TurnOff() {
  const toast = useToast();
  const turnOff = useTurnOffSecondFactor();
  const { control, submit } = useAccountForm(passwordAndCodeRequestSchema, noProof, turnOff.mutateAsync, () =>
    toast({ text: 'Signing in asks for no code any more.' }),
  );
  return (
    <Stack gap="l">
      <Quiet>The password alone signs you in afterwards. You are told by mail.</Quiet>
      <AccountForm control={control} label="Turn it off" onSubmit={submit}>
        <ProofFields control={control} />
      </AccountForm>
    </Stack>
  );
}

type ProofControl = ReturnType<
  typeof useAccountForm<typeof noProof, { currentPassword: string; code: string }>
>['control'];

function ProofFields({ control }: { control: ProofControl }) {
  return (
    <>
      <PasswordField
        control={control}
        name="currentPassword"
        label="Present password"
        autoComplete="current-password"
      />
      <CodeField control={control} name="code" hint="Of the app, or a recovery code." />
    </>
  );
}
