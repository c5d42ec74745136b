import { useEffect } from 'react';
import type { FieldPath } from 'react-hook-form';

import type { CheckFormValues } from './checkValues';
import type { CheckFormHandle } from './formTypes';
import { forgetTestRun, readTestRun } from './testRun';
import { timedReadings } from './testTimes';

/** Takes what a finished test noted over into the form, where nothing stands yet; the test has done its work then. */
export function useTakeOverRun(
  { getValues, setValue }: CheckFormHandle,
  { userId, bankId, isWanted }: { userId: string | undefined; bankId: string; isWanted: boolean },
) {
  useEffect(() => {
    const run = isWanted && userId !== undefined ? readTestRun(userId, bankId) : undefined;
    if (!run || userId === undefined || run.stage !== 'noted') return;
    const { reading, step } = getValues();
    const noted = { method: 'countedDischarge', ...timedReadings(run), ...run.readings };
    for (const [field, text] of Object.entries(noted)) {
      if (!Object.hasOwn(reading, field) || reading[field as keyof typeof reading] !== '') continue;
      setValue(`reading.${field}` as FieldPath<CheckFormValues>, text, { shouldDirty: true });
    }
    // The cautions stood at the beginning of the test.
    setValue('isAware', true);
    if (step === 0) setValue('step', 1);
    forgetTestRun(userId, bankId);
  }, [getValues, setValue, userId, bankId, isWanted]);
}
