import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import {
  agreementSchema,
  blindListSchema,
  blindOutcomeSchema,
  blindSubmissionSchema,
  type BlindVerdictRequest,
} from '@/lib/contract/agreement';

import { apiRequest } from './http';
import { screeningKey } from './moderation';

const agreementKey = ['agreement'] as const;

/** How far two moderators agree, over the decisions looked at twice. */
export const agreementQuery = queryOptions({
  queryKey: [...agreementKey, 'figures'] as const,
  queryFn: ({ signal }) => apiRequest(agreementSchema, '/api/agreement', { signal }),
});

/** What waits for the reader's second look. */
export const blindListQuery = queryOptions({
  queryKey: [...agreementKey, 'waiting'] as const,
  queryFn: async ({ signal }) =>
    (await apiRequest(blindListSchema, '/api/blind-reviews', { signal })).reviews,
});

/** A submission as it stood before it was decided. */
export const blindSubmissionQuery = (reviewId: string) =>
  queryOptions({
    queryKey: [...agreementKey, 'review', reviewId] as const,
    queryFn: ({ signal }) => apiRequest(blindSubmissionSchema, `/api/blind-reviews/${reviewId}`, { signal }),
    staleTime: Infinity,
  });

/** Gives the second verdict. Invalidates: the agreement, what waits, the screening (the check may be seen now). */
export function useGiveVerdict(reviewId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (request: BlindVerdictRequest) =>
      apiRequest(blindOutcomeSchema, `/api/blind-reviews/${reviewId}`, { method: 'POST', body: request }),
    onSuccess: () => {
      for (const queryKey of [agreementQuery.queryKey, blindListQuery.queryKey, screeningKey])
        void client.invalidateQueries({ queryKey });
    },
  });
}
