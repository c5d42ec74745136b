import { useEffect, useRef } from 'react';
import { get, useFormState, useWatch } from 'react-hook-form';

import type { ValidatedForm } from '@/components/forms';
import type { BankFields } from '@/lib/contract/banks';

import { bankSteps, lastBankStep } from './bankSteps';
import type { BankFormValues } from './bankValues';

/** Where in the wizard one is: on when a step is right, back at any time. The step is kept with the draft. */
export function useBankSteps({
  control,
  setValue,
  setFocus,
  trigger,
  clearErrors,
}: ValidatedForm<BankFormValues, BankFields>) {
  const { errors } = useFormState({ control });
  const step = Math.min(lastBankStep, Math.max(0, useWatch({ control, name: 'step' })));
  const shown = useRef(step);

  useEffect(() => {
    if (shown.current === step) return;
    shown.current = step;
    window.scrollTo(0, 0);
    // Led here by something that was refused: to the field itself.
    const wrong = bankSteps[step]?.fields.find((field) => get(errors, field) !== undefined);
    if (wrong) setFocus(wrong);
  }, [step, errors, setFocus]);

  const go = (to: number) => {
    clearErrors('root');
    setValue('step', to, { shouldDirty: true });
  };

  const next = async () => {
    if (await trigger([...(bankSteps[step]?.fields ?? [])], { shouldFocus: true })) go(step + 1);
  };

  return { step, go, next };
}
