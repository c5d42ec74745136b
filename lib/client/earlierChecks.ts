import { useMutation, useQueryClient } from '@tanstack/react-query';

import { consent } from '@/lib/contract/consent';
import { type EarlierChoice, earlierReportSchema } from '@/lib/contract/earlierChecks';

import { banksKey, checksKey } from './banks';
import { saveFile, uploadFile } from './http';

/** Fetches an empty file of earlier checks to fill in. */
export const saveEarlierTemplate = (style: 'point' | 'comma') =>
  saveFile(`/api/earlier-checks/template.csv?style=${style}`);

/** What the rows of a file would become; nothing is stored. `bankId` is empty where each row names its bank. */
export function usePreviewEarlier(bankId: string) {
  return useMutation({
    mutationFn: (file: File) =>
      uploadFile(earlierReportSchema, '/api/earlier-checks/preview', file, { fields: { bankId } }),
  });
}

interface EarlierToSend {
  file: File;
  choice: EarlierChoice;
  /** Of the report that was looked at. */
  digest: string;
}

/** Safe to repeat: what is there already is not stored again. Invalidates: banks (with their checks), single checks. */
export function useSendEarlier(bankId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: ({ file, choice, digest }: EarlierToSend) =>
      uploadFile(earlierReportSchema, '/api/earlier-checks', file, {
        fields: { bankId, choice, digest, consent: String(consent.version) },
      }),
    onSuccess: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: banksKey }),
        client.invalidateQueries({ queryKey: checksKey }),
      ]),
  });
}
