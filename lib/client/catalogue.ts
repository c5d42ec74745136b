import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import {
  type CataloguePage,
  cataloguePageSchema,
  catalogueSchema,
  type ClaimFields,
  type EditCellTypeRequest,
  type MergeCellTypesRequest,
  mergePreviewSchema,
} from '@/lib/contract/catalogue';

import { banksKey, cellTypesQuery } from './banks';
import { cellsKey } from './cells';
import { apiRequest } from './http';
import { screeningKey } from './moderation';

const catalogueKey = ['catalogue'] as const;
const at = (cellId: string, rest = '') => `/api/catalogue/${encodeURIComponent(cellId)}${rest}`;

/** Every cell type with what depends on it. */
export const catalogueQuery = queryOptions({
  queryKey: [...catalogueKey, 'list'] as const,
  queryFn: async ({ signal }) => (await apiRequest(catalogueSchema, '/api/catalogue', { signal })).cellTypes,
  staleTime: 10_000,
});

export const cataloguePageQuery = (cellId: string) =>
  queryOptions({
    queryKey: [...catalogueKey, 'page', cellId] as const,
    queryFn: ({ signal }) => apiRequest(cataloguePageSchema, at(cellId), { signal }),
    staleTime: 10_000,
  });

/** What a merge would move. */
export const mergePreviewQuery = (cellId: string, intoId: string) =>
  queryOptions({
    queryKey: [...catalogueKey, 'merge', cellId, intoId] as const,
    queryFn: ({ signal }) =>
      apiRequest(mergePreviewSchema, at(cellId, `/merge?intoId=${encodeURIComponent(intoId)}`), { signal }),
    staleTime: 0,
  });

/** Changes an entry. Invalidates: catalogue, cells, choices of cell types, banks, screening. */
function useChange<Input>(send: (input: Input) => Promise<CataloguePage>) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: send,
    onSuccess: () => {
      for (const queryKey of [catalogueKey, cellsKey, cellTypesQuery.queryKey, banksKey, screeningKey])
        void client.invalidateQueries({ queryKey });
    },
  });
}

const change = (method: 'POST' | 'PUT' | 'DELETE', path: string, body?: object) =>
  apiRequest(cataloguePageSchema, path, { method, body });

export const useEditCellType = (cellId: string) =>
  useChange((edit: EditCellTypeRequest) => change('PUT', at(cellId), edit));

export const useListCellType = (cellId: string) =>
  useChange((version: number) => change('POST', at(cellId, '/list'), { version }));

export const useDeclineCellType = (cellId: string) =>
  useChange((request: { version: number; reason: string }) =>
    change('POST', at(cellId, '/decline'), request),
  );

export const useMergeCellTypes = (cellId: string) =>
  useChange((request: MergeCellTypesRequest) => change('POST', at(cellId, '/merge'), request));

/** Adds a claim, or puts one right where its id is given. */
export const useSaveClaim = (cellId: string, claimId: string | null) =>
  useChange((request: { version: number; claim: ClaimFields }) =>
    claimId === null
      ? change('POST', at(cellId, '/claims'), request)
      : change('PUT', at(cellId, `/claims/${claimId}`), request),
  );

export const useRemoveClaim = (cellId: string) =>
  useChange(({ claimId, version }: { claimId: string; version: number }) =>
    change('DELETE', at(cellId, `/claims/${claimId}?version=${version}`)),
  );
