import { useQuery } from '@tanstack/react-query';
import { useRouter } from 'expo-router';

import { QueryPage } from '@/components/QueryPage';
import { useLocalDraft, useSavedNote, useServerErrors, useValidatedForm } from '@/components/forms';
import { Banner, Button, Page, PageHead, useToast } from '@/components/ui';
import { cellTypesQuery, useCreateBank } from '@/lib/client/banks';
import { useSession } from '@/lib/client/session';
import type { BankFields, CellTypeBrief } from '@/lib/contract/banks';

import { BankForm } from './BankForm';
import { bankFormSchema, type BankFormValues, emptyBank } from './bankValues';
import { FormSkeleton } from './FormSkeleton';

/** Adds a bank to one's own. */
export function NewBankPage() {
  const query = useQuery(cellTypesQuery);
  return (
    <QueryPage
      query={query}
      title="Add a bank"
      back={{ href: '/banks', label: 'My banks' }}
      narrow
      loading={<FormSkeleton label="Loading the cell types" />}
    >
      {(cellTypes) => <NewBank cellTypes={cellTypes} />}
    </QueryPage>
  );
}

function NewBank({ cellTypes }: { cellTypes: CellTypeBrief[] }) {
  const { user } = useSession();
  const router = useRouter();
  const toast = useToast();
  const createBank = useCreateBank();
  const form = useValidatedForm<BankFormValues, BankFields>(bankFormSchema, emptyBank);
  const draft = useLocalDraft(user && `${user.id}/bank/new`, form);
  const savedNote = useSavedNote(draft);
  const showErrors = useServerErrors(form);

  const send = async (fields: BankFields) => {
    try {
      const bank = await createBank.mutateAsync(fields);
      draft.clear();
      toast({ text: `${bank.name} is added.` });
      router.replace({ pathname: '/banks/[bankId]', params: { bankId: bank.id } });
    } catch (error) {
      showErrors(error);
    }
  };

  return (
    <Page narrow>
      <PageHead
        title="Add a bank"
        back={{ href: '/banks', label: 'My banks' }}
        note={savedNote}
        sub="One installation of cells of one type, with one history."
      />
      {draft.wasRestored && (
        <Banner
          kind="info"
          title="Taken up where you left off"
          actions={
            <Button
              label="Start anew"
              onPress={() => {
                draft.clear();
                form.reset(emptyBank);
              }}
            />
          }
        >
          What you typed earlier on this device is back in its fields.
        </Banner>
      )}
      <BankForm form={form} cellTypes={cellTypes} onSend={send} label="Add the bank" />
    </Page>
  );
}
