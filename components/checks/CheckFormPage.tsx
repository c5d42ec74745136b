import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useRouter } from 'expo-router';
import { useState } from 'react';
import { useWatch } from 'react-hook-form';

import { FormSkeleton } from '@/components/banks/FormSkeleton';
import { QueryPage } from '@/components/QueryPage';
import { useLocalDraft, useServerErrors, useValidatedForm } from '@/components/forms';
import { ButtonLink, EmptyState, Page, PageHead, useToast } from '@/components/ui';
import { bankQuery } from '@/lib/client/banks';
import { bankChecksQuery, useResubmitCheck, useSubmitCheck } from '@/lib/client/checks';
import { ApiError } from '@/lib/client/http';
import { useKeptFiles } from '@/lib/client/keptFiles';
import { useSession } from '@/lib/client/session';
import { putWaiting } from '@/lib/client/waitingChecks';
import type { Bank } from '@/lib/contract/banks';
import type { Check } from '@/lib/contract/checks';
import { consent } from '@/lib/contract/consent';

import { CheckConflict } from './CheckConflict';
import { CheckForm } from './CheckForm';
import { checkFormSchema, type ReadCheck } from './checkSchema';
import { firstStepOf, lastStep } from './checkSteps';
import { type CheckFormValues, newCheckValues, valuesOfCheck } from './checkValues';
import { openStates } from './checkWords';
import { isAsSent } from './isAsSent';
import { newId } from './newId';
import { useTakeOverRun } from './useTakeOverRun';
import { useWaitingCheck } from './useWaitingCheck';
import { WaitingCheckPage } from './WaitingCheckPage';

interface CheckFormPageProps {
  bankId: string;
  /** A check to be corrected; a new one is added without it. */
  correct?: string;
}

/** Adds a check to a bank, or corrects one that is not decided yet. */
export function CheckFormPage({ bankId, correct }: CheckFormPageProps) {
  const bank = useQuery(bankQuery(bankId));
  const checks = useQuery(bankChecksQuery(bankId));
  const frame = {
    title: correct ? 'Correct the check' : 'Add a check',
    back: { href: { pathname: '/banks/[bankId]', params: { bankId } }, label: 'The bank' },
    narrow: true,
    loading: <FormSkeleton label="Loading the bank" />,
  } as const;
  return (
    <QueryPage {...frame} query={bank}>
      {(loadedBank) => (
        <QueryPage {...frame} query={checks}>
          {(loadedChecks) => <CheckToFill bank={loadedBank} checks={loadedChecks} correct={correct} />}
        </QueryPage>
      )}
    </QueryPage>
  );
}

interface CheckToFillProps {
  bank: Bank;
  checks: Check[];
  correct: string | undefined;
}

function CheckToFill({ bank, checks, correct }: CheckToFillProps) {
  const corrected = checks.find(({ id }) => id === correct);
  const { isPending, waiting } = useWaitingCheck(bank.id);
  if (correct !== undefined && !(corrected && openStates.has(corrected.state)))
    return (
      <Page narrow>
        <PageHead
          title="Nothing to correct"
          back={{ href: { pathname: '/banks/[bankId]', params: { bankId: bank.id } }, label: bank.name }}
        />
        <EmptyState
          title="This check can't be changed"
          action={
            <ButtonLink
              href={{ pathname: '/banks/[bankId]', params: { bankId: bank.id } }}
              label="To the bank"
            />
          }
        >
          It was decided, withdrawn, or is no check of this bank.
        </EmptyState>
      </Page>
    );
  if (!corrected && isPending) return <FormSkeletonPage />;
  if (!corrected && waiting) return <WaitingCheckPage bank={bank} waiting={waiting} />;
  return <FilledForm key={corrected?.id ?? 'new'} bank={bank} checks={checks} corrected={corrected} />;
}

function FormSkeletonPage() {
  return (
    <Page narrow>
      <FormSkeleton label="Looking for what is kept on this device" />
    </Page>
  );
}

function FilledForm({
  bank,
  checks,
  corrected,
}: Omit<CheckToFillProps, 'correct'> & { corrected: Check | undefined }) {
  const { user } = useSession();
  const router = useRouter();
  const toast = useToast();
  const submitCheck = useSubmitCheck(bank.id);
  const resubmitCheck = useResubmitCheck(corrected?.id ?? '');
  const { refetch } = useQuery(bankChecksQuery(bank.id));
  const fresh = () =>
    corrected ? valuesOfCheck(corrected, lastStep) : newCheckValues(checks.at(-1), newId());
  const [defaults] = useState(fresh);
  const form = useValidatedForm<CheckFormValues, ReadCheck>(checkFormSchema, defaults);
  const draft = useLocalDraft(user && `${user.id}/check/${corrected?.id ?? bank.id}`, form);
  useTakeOverRun(form, { userId: user?.id, bankId: bank.id, isWanted: !corrected });
  const showErrors = useServerErrors(form);
  const client = useQueryClient();
  const photo = useKeptFiles(user?.id, 'photo', bank.id);
  const goTo = (paths: readonly string[]) => form.setValue('step', firstStepOf(paths));

  const send = form.handleSubmit(
    async ({ idempotencyKey, answer, version, ...fields }) => {
      try {
        const check = corrected
          ? await resubmitCheck.mutateAsync({ ...fields, answer, version })
          : await submitCheck.mutateAsync({ ...fields, idempotencyKey, consent: consent.version });
        draft.clear();
        toast({
          text: isAsSent(fields, check)
            ? 'Sent. A moderator looks at it next.'
            : 'It had arrived before you changed it. Correct it here if the figures differ.',
        });
        router.replace({
          pathname: '/banks/[bankId]/checks/[checkId]',
          params: { bankId: bank.id, checkId: check.id },
        });
      } catch (error) {
        const isOffline = error instanceof ApiError && error.code === 'offline';
        if (isOffline && user && !corrected) {
          const check = { ...fields, idempotencyKey, consent: consent.version };
          const hasPhoto = fields.photoId === null && photo.files.length > 0;
          const waiting = { bankId: bank.id, bankName: bank.name, check, hasPhoto, problem: null };
          if (await putWaiting(client, user.id, waiting)) {
            toast({ text: 'No connection. The check waits on this device and is sent when there is one.' });
            router.replace({ pathname: '/banks/[bankId]', params: { bankId: bank.id } });
            return;
          }
        }
        if (error instanceof ApiError) goTo(Object.keys(error.fields));
        // What stands meanwhile decides whether it can still be corrected, and over which version.
        if (error instanceof ApiError && corrected) void refetch();
        showErrors(error);
      }
    },
    () => {
      const read = checkFormSchema.safeParse(form.getValues());
      if (!read.success) goTo(read.error.issues.map(({ path }) => path.join('.')));
    },
  );

  const startAnew = () => {
    draft.clear();
    form.reset(fresh());
  };
  // What was typed over an older state of the check, on this device or before a reload, does not replace a newer one.
  const typedOver = useWatch({ control: form.control, name: 'version' });
  const isOvertaken = corrected !== undefined && typedOver !== corrected.version && !resubmitCheck.isSuccess;

  return (
    <CheckForm
      form={form}
      draft={draft}
      bank={bank}
      checks={checks}
      corrected={corrected}
      remark={
        isOvertaken && (
          <CheckConflict
            stored={corrected}
            typed={form.getValues()}
            onKeepMine={() => form.setValue('version', corrected.version, { shouldDirty: true })}
            onTakeStored={startAnew}
          />
        )
      }
      onSend={() => void send()}
      onStartAnew={startAnew}
    />
  );
}
