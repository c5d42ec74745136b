import { useQuery } from '@tanstack/react-query';
import { useRouter } from 'expo-router';
import { useState } from 'react';

import { QueryPage } from '@/components/QueryPage';
import { useLocalDraft, useServerErrors, useValidatedForm } from '@/components/forms';
import { useToast } from '@/components/ui';
import { banksQuery, cellTypesQuery, useCreateBank } from '@/lib/client/banks';
import { ApiError } from '@/lib/client/http';
import { useSession } from '@/lib/client/session';
import type { Bank, BankFields, CellTypeChoice } from '@/lib/contract/banks';

import { bankStepOf } from './bankSteps';
import { bankFormSchema, type BankFormValues, newBankValues } from './bankValues';
import { BankWizard } from './BankWizard';
import { FormSkeleton } from './FormSkeleton';

/** Adds a bank to one's own. */
export function NewBankPage() {
  const cellTypes = useQuery(cellTypesQuery);
  const banks = useQuery(banksQuery);
  const frame = {
    title: 'Add a bank',
    back: { href: '/banks', label: 'My banks' },
    narrow: true,
    loading: <FormSkeleton label="Loading the cell types" />,
  } as const;
  return (
    <QueryPage {...frame} query={cellTypes}>
      {(choices) => (
        <QueryPage {...frame} query={banks}>
          {(own) => <NewBank cellTypes={choices} last={own.at(-1)} />}
        </QueryPage>
      )}
    </QueryPage>
  );
}

function NewBank({ cellTypes, last }: { cellTypes: CellTypeChoice[]; last: Bank | undefined }) {
  const { user } = useSession();
  const router = useRouter();
  const toast = useToast();
  const createBank = useCreateBank();
  const [defaults] = useState(() => newBankValues(last));
  const form = useValidatedForm<BankFormValues, BankFields>(bankFormSchema, defaults);
  const draft = useLocalDraft(user && `${user.id}/bank/new`, form);
  const showErrors = useServerErrors(form);
  const goTo = (paths: readonly string[]) => form.setValue('step', bankStepOf(paths));

  const send = form.handleSubmit(
    async (fields) => {
      try {
        const bank = await createBank.mutateAsync(fields);
        draft.clear();
        toast({ text: `${bank.name} is added.` });
        router.replace({ pathname: '/banks/[bankId]', params: { bankId: bank.id } });
      } catch (error) {
        if (error instanceof ApiError && Object.keys(error.fields).length > 0)
          goTo(Object.keys(error.fields));
        showErrors(error);
      }
    },
    (errors) => goTo(Object.keys(errors)),
  );

  return (
    <BankWizard
      form={form}
      cellTypes={cellTypes}
      draft={draft}
      onSend={() => void send()}
      onStartAnew={() => {
        draft.clear();
        form.reset(defaults);
      }}
    />
  );
}
