import { queryOptions } from '@tanstack/react-query';

import { cellListSchema, cellPageSchema } from '@/lib/contract/cells';

import { firstAnswer } from './firstAnswers';
import { apiRequest } from './http';

/** Everything of the public fit lies under this key. */
export const cellsKey = ['cells'] as const;

const listPath = '/api/cells';

/** Every cell type with its measured life at the standard use. */
export const cellListQuery = () =>
  queryOptions({
    queryKey: [...cellsKey, 'list'] as const,
    queryFn: ({ signal }) => apiRequest(cellListSchema, listPath, { signal }),
    ...firstAnswer(cellListSchema, listPath),
  });

/** The page of a cell type, whole or in one band such as `depth:deep`. */
export const cellPageQuery = (cellId: string, band?: string) => {
  const query = band === undefined ? '' : `?band=${encodeURIComponent(band)}`;
  const path = `${listPath}/${encodeURIComponent(cellId)}${query}`;
  return queryOptions({
    queryKey: [...cellsKey, 'page', cellId, band ?? null] as const,
    queryFn: ({ signal }) => apiRequest(cellPageSchema, path, { signal }),
    ...firstAnswer(cellPageSchema, path),
  });
};
