import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import {
  type MakeRelease,
  releaseListSchema,
  releasePreviewSchema,
  releaseQueuedSchema,
} from '@/lib/contract/releases';

import { apiRequest } from './http';

const releasesKey = ['releases'] as const;
/** How often a release in the making is asked after. */
const makingPollMs = 2_000;

/** Releases with their files, newest first. */
export const releaseListQuery = () =>
  queryOptions({
    queryKey: [...releasesKey, 'list'] as const,
    queryFn: ({ signal }) => apiRequest(releaseListSchema, '/api/releases', { signal }),
  });

/** What the next release would hold: for stewards. */
export const releasePreviewQuery = () =>
  queryOptions({
    queryKey: [...releasesKey, 'preview'] as const,
    queryFn: ({ signal }) => apiRequest(releasePreviewSchema, '/api/releases/preview', { signal }),
    refetchInterval: ({ state }) => (state.data?.isMaking ? makingPollMs : false),
  });

/** Asks for the next release. */
export function useMakeRelease() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: MakeRelease) =>
      apiRequest(releaseQueuedSchema, '/api/releases', { method: 'POST', body }),
    onSuccess: () => client.invalidateQueries({ queryKey: releasesKey }),
  });
}
