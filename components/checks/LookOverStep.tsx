import { useMemo } from 'react';
import { useWatch } from 'react-hook-form';

import { BoundTextArea } from '@/components/forms';
import { Banner, Button, Divider, Heading, Link, Stack, Text } from '@/components/ui';
import type { Check } from '@/lib/contract/checks';
import { consent } from '@/lib/contract/consent';
import { limits } from '@/lib/contract/limits';

import { checkFormSchema } from './checkSchema';
import { checkSteps, firstStepOf } from './checkSteps';
import type { CheckFormValues } from './checkValues';
import { Comparison } from './Comparison';
import { computeCase } from './computedCase';
import { ComputedView } from './ComputedView';
import { EnteredOverview } from './EnteredOverview';
import type { StepProps } from './formTypes';
import { previousCheck } from './previousCheck';
import { TestRemarks } from './TestRemarks';
import { useLogFigures } from './useLogFigures';

interface LookOverProps extends StepProps {
  /** The bank's checks. */
  checks: Check[];
  /** The one being corrected. */
  corrected: Check | undefined;
  onChange: (step: number) => void;
}

/** Everything entered, what it comes to, and only now what it stands beside. */
export function LookOverStep({ form, bank, checks, corrected, onChange }: LookOverProps) {
  const { control } = form;
  const values = useWatch({ control }) as CheckFormValues;
  const { upload } = useLogFigures(form);
  const read = useMemo(() => checkFormSchema.safeParse(values), [values]);
  if (!read.success) {
    const step = firstStepOf(read.error.issues.map(({ path }) => path.join('.')));
    return (
      <Banner
        kind="caution"
        title="Something is still missing"
        actions={<Button label="Go there" onPress={() => onChange(step)} />}
      >
        {`The figures are computed when every step is filled in. Look at "${checkSteps[step]?.title ?? ''}".`}
      </Banner>
    );
  }
  const entered = read.data;
  const previous = previousCheck(checks, entered.reading.testedOn, corrected?.id);
  const log = entered.uploadId === null ? null : (upload?.result ?? null);
  const computedCase = computeCase(bank, entered, log, previous);
  return (
    <Stack gap="xl">
      <ComputedView computedCase={computedCase} />
      <Divider />
      <TestRemarks bank={bank} reading={values.reading} />
      <Divider />
      <Comparison computedCase={computedCase} />
      <Divider strong />
      <Stack gap="s">
        <Heading>What you entered</Heading>
        <EnteredOverview entered={entered} onChange={onChange} />
      </Stack>
      {corrected?.state === 'sentBack' ? (
        <BoundTextArea
          control={control}
          name="answer"
          label="Answer to the moderator"
          hint="What you corrected, and why."
          maxLength={limits.noteLength.max}
          optional
        />
      ) : null}
      <BoundTextArea
        control={control}
        name="note"
        label="Note for the moderator"
        hint="Anything odd about the test. Never published; leave out names and places."
        maxLength={limits.noteLength.max}
        optional
      />
      <Text tone="quiet">
        {consent.before}
        <Link href={consent.address}>{consent.licence}</Link>
        {consent.after}
      </Text>
    </Stack>
  );
}
