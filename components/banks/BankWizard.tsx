import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { space } from '@/components/theme';
import {
  Form,
  FormError,
  type LocalDraft,
  RestoredDraft,
  SubmitButton,
  useSavedNote,
} from '@/components/forms';
import { ActionBar, Button, Page, PageHead, Quiet, Stack, Steps } from '@/components/ui';

import { stepFields } from './BankForm';
import type { BankFieldsProps } from './bankFormTypes';
import { BankLookOver } from './BankLookOver';
import { bankSteps, lastBankStep } from './bankSteps';
import { useBankSteps } from './useBankSteps';

interface BankWizardProps extends BankFieldsProps {
  draft: LocalDraft;
  onSend: () => void;
  onStartAnew: () => void;
}

/** A new bank in short steps; what is typed is kept on the device until it is sent. */
export function BankWizard({ form, cellTypes, draft, onSend, onStartAnew }: BankWizardProps) {
  const { control } = form;
  const { step, go, next } = useBankSteps(form);
  const savedNote = useSavedNote(draft);
  const [isRestoredSeen, setIsRestoredSeen] = useState(false);
  const { title, lead } = bankSteps[step] ?? { title: '', lead: '' };
  const Fields = stepFields[step];
  const isLast = step === lastBankStep;
  const submit = isLast ? onSend : () => void next();

  return (
    <Page narrow>
      <PageHead
        key={step}
        title={title}
        documentTitle={`${title}, add a bank`}
        back={{ href: '/banks', label: 'My banks' }}
        note={savedNote}
        above={
          <Stack gap="xs">
            <Steps steps={bankSteps.map((one) => one.title)} current={step} />
            <Quiet>{`Add a bank, step ${step + 1} of ${bankSteps.length}`}</Quiet>
          </Stack>
        }
        sub={lead}
        isRuled={false}
      />
      {draft.wasRestored && !isRestoredSeen && (
        <RestoredDraft onGoOn={() => setIsRestoredSeen(true)} onStartAnew={onStartAnew} />
      )}
      <Form label={title} onSubmit={submit}>
        {Fields ? (
          <Fields form={form} cellTypes={cellTypes} />
        ) : (
          <BankLookOver form={form} cellTypes={cellTypes} onChange={go} />
        )}
        {step > 0 && (
          <View style={styles.before}>
            <Button
              kind="quiet"
              icon="back"
              label={`Back to ${bankSteps[step - 1]?.next ?? ''}`}
              onPress={() => go(step - 1)}
            />
          </View>
        )}
        <FormError control={control} />
        <ActionBar>
          {isLast ? (
            <SubmitButton control={control} label="Add the bank" onPress={submit} wide />
          ) : (
            <Button kind="primary" label={`Next: ${bankSteps[step + 1]?.next ?? ''}`} onPress={submit} wide />
          )}
        </ActionBar>
      </Form>
    </Page>
  );
}

const styles = StyleSheet.create({
  before: { marginHorizontal: -space.s },
});
