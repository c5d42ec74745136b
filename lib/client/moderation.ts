import { infiniteQueryOptions, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import type { CheckState } from '@/lib/contract/checks';
import {
  type DecisionRequest,
  decisionResultSchema,
  queueSchema,
  submissionSchema,
} from '@/lib/contract/moderation';

import { cellsKey } from './cells';
import { fitsKey } from './fits';
import { apiRequest } from './http';

/** Queue and submissions lie under this key. */
export const screeningKey = ['screening'] as const;

/** The queue of a state page by page, the worst findings first. Others decide meanwhile, so it ages fast. */
export const queueQuery = (state: CheckState) =>
  infiniteQueryOptions({
    queryKey: [...screeningKey, 'queue', state] as const,
    queryFn: ({ pageParam, signal }) => {
      const after = pageParam === null ? '' : `&after=${encodeURIComponent(pageParam)}`;
      return apiRequest(queueSchema, `/api/screening?state=${state}${after}`, { signal });
    },
    initialPageParam: null as string | null,
    getNextPageParam: ({ next }) => next,
    staleTime: 10_000,
  });

export const submissionQuery = (checkId: string) =>
  queryOptions({
    queryKey: [...screeningKey, 'submission', checkId] as const,
    queryFn: ({ signal }) => apiRequest(submissionSchema, `/api/screening/${checkId}`, { signal }),
    staleTime: 10_000,
  });

/** Invalidates: the queue, all submissions (their bank's history shows this one), fits, cells; after a refusal too. */
export function useDecide(checkId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (decision: DecisionRequest) =>
      apiRequest(decisionResultSchema, `/api/screening/${checkId}/decision`, {
        method: 'POST',
        body: decision,
      }),
    onSettled: () =>
      Promise.all(
        [screeningKey, fitsKey, cellsKey].map((queryKey) => client.invalidateQueries({ queryKey })),
      ),
  });
}
