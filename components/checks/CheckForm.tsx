import { type ReactNode, useState } from 'react';
import { StyleSheet, View } from 'react-native';

import {
  Form,
  FormError,
  type LocalDraft,
  RestoredDraft,
  SubmitButton,
  useSavedNote,
} from '@/components/forms';
import { ActionBar, Button, Page, PageHead, Steps } from '@/components/ui';
import type { Bank } from '@/lib/contract/banks';
import type { Check } from '@/lib/contract/checks';
import { formatDate, formatQuantity } from '@/lib/units';
import { defaultSettings } from '@/lib/measure';

import { CautionStep } from './CautionStep';
import { checkSteps, lastStep } from './checkSteps';
import { EndsStep } from './EndsStep';
import type { CheckFormHandle } from './formTypes';
import { LastAnswers } from './LastAnswers';
import { LivedStep } from './LivedStep';
import { LookOverStep } from './LookOverStep';
import { MeterStep } from './MeterStep';
import { EntryPart, TestStep } from './TestStep';
import { useCheckSteps } from './useCheckSteps';

interface CheckFormProps {
  form: CheckFormHandle;
  draft: LocalDraft;
  bank: Bank;
  checks: Check[];
  /** The check being corrected; undefined for a new one. */
  corrected: Check | undefined;
  /** What has to be answered before it can be sent. */
  remark?: ReactNode;
  onSend: () => void;
  onStartAnew: () => void;
}

const cutOff = formatQuantity(defaultSettings.cutOffCellV, 'V', { decimals: 1 });

/** What each step is about, in a sentence. */
const leads = (bank: Bank) => [
  'A test empties the bank once, from full. It takes hours, and somebody stays with it.',
  'A log makes the figure surer. Typed figures count too.',
  `Stop the load yourself at ${cutOff} on the lowest cell, before the BMS has to. Then read the meter.`,
  "The maker's voltages come first. Note what ended the charge and the discharge.",
  `How ${bank.name} was used since its previous check, or since new for a first one.`,
  'What the figures come to, and what they stand beside. Nothing is sent until you say so.',
];

/** The form of a check in short steps; what is typed is kept on the device until it is sent. */
export function CheckForm({
  form,
  draft,
  bank,
  checks,
  corrected,
  remark,
  onSend,
  onStartAnew,
}: CheckFormProps) {
  const { control } = form;
  const { step, go, next } = useCheckSteps(form);
  const savedNote = useSavedNote(draft);
  const [isRestoredSeen, setIsRestoredSeen] = useState(false);
  const { title } = checkSteps[step] ?? { title: '' };
  const isLast = step === lastStep;
  const stepProps = { form, bank };
  const submit = isLast ? onSend : () => void next();

  return (
    <Page narrow>
      <PageHead
        key={step}
        title={title}
        documentTitle={`${title}, ${corrected ? `correct the check of ${formatDate(corrected.reading.testedOn)}` : 'add a check'}, ${bank.name}`}
        back={{ href: { pathname: '/banks/[bankId]', params: { bankId: bank.id } }, label: bank.name }}
        note={savedNote}
        above={<Steps steps={checkSteps.map((one) => one.title)} current={step} />}
        sub={leads(bank)[step]}
        isRuled={false}
      />
      {draft.wasRestored && !isRestoredSeen && (
        <RestoredDraft onGoOn={() => setIsRestoredSeen(true)} onStartAnew={onStartAnew} />
      )}
      {step === 1 && <EntryPart {...stepProps} />}
      <Form label={title} onSubmit={submit}>
        {step === 0 && <CautionStep {...stepProps} />}
        {step === 1 && <TestStep {...stepProps} />}
        {step === 2 && <MeterStep {...stepProps} />}
        {step === 3 && <EndsStep {...stepProps} />}
        {step === 4 && !corrected && <LastAnswers form={form} checks={checks} />}
        {step === 4 && <LivedStep {...stepProps} />}
        {isLast && <LookOverStep {...stepProps} checks={checks} corrected={corrected} onChange={go} />}
        {step > 0 && (
          <View style={styles.before}>
            <Button
              kind="quiet"
              icon="back"
              label={`Back to ${checkSteps[step - 1]?.next ?? ''}`}
              onPress={() => go(step - 1)}
            />
          </View>
        )}
        {remark}
        <FormError control={control} />
        <ActionBar>
          {isLast ? (
            <SubmitButton
              control={control}
              label={corrected ? 'Send the corrected check' : 'Send the check'}
              onPress={submit}
              wide
            />
          ) : (
            <Button
              kind="primary"
              label={`Next: ${checkSteps[step + 1]?.next ?? ''}`}
              onPress={submit}
              wide
            />
          )}
        </ActionBar>
      </Form>
    </Page>
  );
}

const styles = StyleSheet.create({
  before: { marginHorizontal: -8 },
});
