import { useQuery } from '@tanstack/react-query';
import { useRouter } from 'expo-router';
import { useWatch } from 'react-hook-form';

import { QueryPage } from '@/components/QueryPage';
import { useLocalDraft, useSavedNote, useServerErrors, useValidatedForm } from '@/components/forms';
import { Banner, Button, Page, PageHead, useToast } from '@/components/ui';
import { bankQuery, cellTypesQuery, useUpdateBank } from '@/lib/client/banks';
import { ApiError } from '@/lib/client/http';
import { useSession } from '@/lib/client/session';
import type { Bank, BankFields, CellTypeChoice } from '@/lib/contract/banks';

import { BankConflict } from './BankConflict';
import { BankForm } from './BankForm';
import { bankFormSchema, type BankFormValues, valuesOfBank } from './bankValues';
import { FormSkeleton } from './FormSkeleton';

/** Changes what is said of a bank. */
export function EditBankPage({ bankId }: { bankId: string }) {
  const bank = useQuery(bankQuery(bankId));
  const cellTypes = useQuery(cellTypesQuery);
  const frame = {
    title: 'Change the bank',
    back: { href: { pathname: '/banks/[bankId]', params: { bankId } }, label: 'The bank' },
    narrow: true,
    loading: <FormSkeleton label="Loading the bank" />,
  } as const;
  return (
    <QueryPage {...frame} query={bank}>
      {(stored) => (
        <QueryPage {...frame} query={cellTypes}>
          {(listed) => <EditBank stored={stored} cellTypes={withOwn(listed, stored)} />}
        </QueryPage>
      )}
    </QueryPage>
  );
}

/** A cell type that is no longer listed stays the bank's own. */
const withOwn = (choices: CellTypeChoice[], { cellType }: Bank): CellTypeChoice[] =>
  choices.some(({ id }) => id === cellType.id)
    ? choices
    : [{ ...cellType, faceAreaMm2: null, isProposed: false }, ...choices];

function EditBank({ stored, cellTypes }: { stored: Bank; cellTypes: CellTypeChoice[] }) {
  const { user } = useSession();
  const router = useRouter();
  const toast = useToast();
  const { refetch } = useQuery(bankQuery(stored.id));
  const updateBank = useUpdateBank(stored.id);
  const form = useValidatedForm<BankFormValues, BankFields>(bankFormSchema, valuesOfBank(stored));
  const draft = useLocalDraft(user && `${user.id}/bank/${stored.id}`, form);
  const savedNote = useSavedNote(draft);
  const showErrors = useServerErrors(form);
  // What was typed over an older state of the bank, here or before a reload, does not replace a newer one.
  const version = useWatch({ control: form.control, name: 'version' });
  const isOvertaken = version !== stored.version && !updateBank.isSuccess;
  const back = { pathname: '/banks/[bankId]', params: { bankId: stored.id } } as const;

  const send = async (fields: BankFields) => {
    try {
      await updateBank.mutateAsync({ ...fields, version: form.getValues('version') });
      draft.clear();
      toast({ text: 'The bank is changed.' });
      router.replace(back);
    } catch (error) {
      if (error instanceof ApiError && error.code === 'versionConflict') void refetch();
      showErrors(error);
    }
  };

  const takeStored = () => {
    draft.clear();
    form.reset(valuesOfBank(stored));
  };

  return (
    <Page narrow>
      <PageHead
        title="Change the bank"
        documentTitle={`Change ${stored.name}`}
        back={{ href: back, label: stored.name }}
        note={savedNote}
        sub="A change of the installation itself, such as a replaced cell, is an event of the bank's page."
      />
      {draft.wasRestored && !isOvertaken && (
        <Banner
          kind="info"
          title="Taken up where you left off"
          actions={<Button label="Back to what is stored" onPress={takeStored} />}
        >
          Changes you typed earlier on this device are back in their fields.
        </Banner>
      )}
      <BankForm
        form={form}
        cellTypes={cellTypes}
        onSend={send}
        label="Save the changes"
        remark={
          isOvertaken ? (
            <BankConflict
              stored={valuesOfBank(stored)}
              typed={form.getValues()}
              onKeepMine={() => {
                form.clearErrors('root');
                form.setValue('version', stored.version, { shouldDirty: true });
              }}
              onTakeStored={takeStored}
            />
          ) : undefined
        }
      />
    </Page>
  );
}
