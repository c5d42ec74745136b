import { useQuery } from '@tanstack/react-query';
import { useWatch } from 'react-hook-form';

import { uploadQuery } from '@/lib/client/uploads';
import type { Upload } from '@/lib/contract/uploads';

import type { CheckFormValues } from './checkValues';
import type { CheckFormHandle } from './formTypes';
import { readingOfLog, resultKey } from './logFill';

export interface LogOfForm {
  /** The log the form stands on; undefined while it is typed, or not known yet. */
  upload: Upload | undefined;
  /** Its figures are in the form. */
  isFilled: boolean;
  fill: (upload: Upload) => void;
}

/** The log that a form stands on, and taking its figures over into the reading. */
export function useLogFigures({ control, setValue, clearErrors }: CheckFormHandle): LogOfForm {
  const [entry, uploadId, filledFrom] = useWatch({ control, name: ['entry', 'uploadId', 'filledFrom'] });
  const isOnLog = entry === 'log' && uploadId !== '';
  const { data } = useQuery({ ...uploadQuery(uploadId), enabled: isOnLog });
  const upload = isOnLog ? data : undefined;

  const fill = (ready: Upload) => {
    if (!ready.result) return;
    const reading = readingOfLog(ready.result);
    for (const field of Object.keys(reading) as (keyof CheckFormValues['reading'])[]) {
      setValue(`reading.${field}`, reading[field] ?? '', { shouldDirty: true });
      clearErrors(`reading.${field}`);
      if (field !== 'testedOn' && field !== 'method') setValue(`sources.${field}`, 'metered');
    }
    setValue('filledFrom', resultKey(ready), { shouldDirty: true });
    clearErrors('uploadId');
  };

  // A stored check keeps the id of its log, not the result it was filled from.
  const isFilled = upload !== undefined && (filledFrom === upload.id || filledFrom === resultKey(upload));
  return { upload, isFilled, fill };
}
