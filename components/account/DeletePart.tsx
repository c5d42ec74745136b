import { useState } from 'react';

import { BoundRadio, chosen, Form, FormError, SubmitButton } from '@/components/forms';
import { Button, Dialog, Heading, Stack, Text, type Option } from '@/components/ui';
import type { useDeleteAccount } from '@/lib/client/ownData';
import {
  type ChecksAfterwards,
  checksAfterwardsSchema,
  deleteAccountRequestSchema,
  type SessionUser,
} from '@/lib/contract/accounts';

import { forgetDrafts } from './forgetDrafts';
import { PasswordField } from './PasswordField';
import { useAccountForm } from './useAccountForm';

interface DeletePartProps {
  user: SessionUser;
  deletion: ReturnType<typeof useDeleteAccount>;
}

/** Deleting the account, with what it means said before it is done. */
export function DeletePart({ user, deletion }: DeletePartProps) {
  const [isAsking, setIsAsking] = useState(false);
  return (
    <Stack gap="m">
      <Heading>Deleting the account</Heading>
      <Text>
        It is done at once and can&apos;t be taken back. Your address and password, the names of your banks,
        all notes and answers, logs and photos are erased. Health records you issued are withdrawn and
        emptied: their links say so. Save what you want to keep before.
      </Text>
      <Button kind="danger" label="Delete the account" onPress={() => setIsAsking(true)} />
      {isAsking && <DeleteDialog user={user} deletion={deletion} onClose={() => setIsAsking(false)} />}
    </Stack>
  );
}

const choices: readonly Option[] = [
  {
    value: 'leave',
    label: 'Leave my checks without a name',
    hint: 'Their figures go on counting, as those of one owner nobody knows. A check that waits for your answer is withdrawn, as nobody could give it.',
  },
  {
    value: 'withdraw',
    label: 'Withdraw my checks from the pool',
    hint: 'They leave the working fit with its next run, and the public figures once the changes of five owners have come together, so that nobody can tell yours.',
  },
] satisfies readonly Option<ChecksAfterwards>[];

const deleteSchema = deleteAccountRequestSchema.extend({ checks: chosen(checksAfterwardsSchema) });

function DeleteDialog({ user, deletion, onClose }: DeletePartProps & { onClose: () => void }) {
  const { control, submit } = useAccountForm(
    deleteSchema,
    { currentPassword: '', checks: '' },
    async (request) => {
      await deletion.mutateAsync(request);
      forgetDrafts(user.id);
    },
  );
  return (
    <Dialog
      isOpen
      onClose={onClose}
      title="Delete the account?"
      actions={
        <>
          <Button label="Keep the account" onPress={onClose} />
          <SubmitButton kind="danger" control={control} label="Delete it now" onPress={submit} />
        </>
      }
    >
      <Form label="Delete the account" onSubmit={submit}>
        <BoundRadio control={control} name="checks" label="Your checks" options={choices} />
        <Text>
          Releases that came out earlier keep what they held, rounded and without a name. What you called your
          meters stays with readings that are left. The record of what was done with a check stays, and names
          nobody.
        </Text>
        <PasswordField
          control={control}
          name="currentPassword"
          label="Present password"
          autoComplete="current-password"
        />
        <FormError control={control} title="The account was not deleted" />
      </Form>
    </Dialog>
  );
}
