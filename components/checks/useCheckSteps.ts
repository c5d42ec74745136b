import { useEffect, useRef } from 'react';
import { get, useFormState, useWatch } from 'react-hook-form';

import { checkSteps, lastStep } from './checkSteps';
import type { CheckFormHandle } from './formTypes';
import { useLogFigures } from './useLogFigures';

const unread = 'The log has not been read yet. Wait for it, answer what it asks, or type the figures.';
const unused = 'Press "Use these figures", or choose to type them: both are there and differ.';

/** Where in the form one is, going on when a step is right, and back at any time. */
export function useCheckSteps(form: CheckFormHandle) {
  const { control, getValues, setValue, setError, setFocus, trigger, clearErrors } = form;
  const { errors } = useFormState({ control });
  const step = Math.min(lastStep, Math.max(0, useWatch({ control, name: 'step' })));
  const { upload, isFilled, fill } = useLogFigures(form);
  const shown = useRef(step);

  useEffect(() => {
    if (shown.current === step) return;
    shown.current = step;
    window.scrollTo(0, 0);
    // Led here by something that was refused: to the field itself.
    const wrong = checkSteps[step]?.fields.find((field) => get(errors, field) !== undefined);
    if (wrong) setFocus(wrong);
  }, [step, errors, setFocus]);

  const go = (to: number) => {
    clearErrors('root');
    setValue('step', to, { shouldDirty: true });
  };

  /** A log's figures come in by themselves where nothing was typed; else its owner decides. */
  const settleLog = (): string | undefined => {
    const { entry, uploadId, reading } = getValues();
    if (entry !== 'log' || uploadId === '' || isFilled) return undefined;
    if (upload?.state !== 'ready') return unread;
    if (reading.capacityAh !== '') return unused;
    fill(upload);
    return undefined;
  };

  const next = async () => {
    const problem = step === 1 ? settleLog() : undefined;
    const isRight = await trigger([...(checkSteps[step]?.fields ?? [])], { shouldFocus: true });
    if (problem) setError('uploadId', { type: 'log', message: problem });
    else if (isRight) go(step + 1);
  };

  return { step, go, next };
}
