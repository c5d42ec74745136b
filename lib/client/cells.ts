import { queryOptions } from '@tanstack/react-query';

import { cellListSchema, cellPageSchema } from '@/lib/contract/cells';

import { apiRequest } from './http';

/** Everything of the public fit lies under this key. */
export const cellsKey = ['cells'] as const;

/** Every cell type with its measured life at the standard use. */
export const cellListQuery = () =>
  queryOptions({
    queryKey: [...cellsKey, 'list'] as const,
    queryFn: ({ signal }) => apiRequest(cellListSchema, '/api/cells', { signal }),
  });

/** The page of a cell type, whole or in one band such as `depth:deep`. */
export const cellPageQuery = (cellId: string, band?: string) =>
  queryOptions({
    queryKey: [...cellsKey, 'page', cellId, band ?? null] as const,
    queryFn: ({ signal }) => {
      const query = band === undefined ? '' : `?band=${encodeURIComponent(band)}`;
      return apiRequest(cellPageSchema, `/api/cells/${encodeURIComponent(cellId)}${query}`, { signal });
    },
  });
