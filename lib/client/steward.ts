import { infiniteQueryOptions, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query';

import { acceptedSchema } from '@/lib/contract/accounts';
import {
  type AppointRequest,
  type ChangePersonRequest,
  type FindPersonRequest,
  foundPersonSchema,
  healthSchema,
  peopleSchema,
  type RecallAtOnceRequest,
  recallAtOnceSchema,
  trailPageSchema,
} from '@/lib/contract/steward';

import { apiRequest } from './http';
import { screeningKey } from './moderation';

const stewardKey = ['steward'] as const;

/** How the exchange stands; looked at anew every half minute while it is shown. */
export const healthQuery = queryOptions({
  queryKey: [...stewardKey, 'health'] as const,
  queryFn: ({ signal }) => apiRequest(healthSchema, '/api/steward/health', { signal }),
  staleTime: 0,
  refetchInterval: ({ state }) =>
    state.data?.trail.isChecking || state.data?.fits.isRunning ? 2_000 : 30_000,
});

export const peopleQuery = queryOptions({
  queryKey: [...stewardKey, 'people'] as const,
  queryFn: ({ signal }) => apiRequest(peopleSchema, '/api/steward/people', { signal }),
  staleTime: 0,
});

export interface TrailFilters {
  kind?: string;
  record?: string;
  from?: string;
  to?: string;
}

/** The trail, newest first, page by page. */
export const trailQuery = (filters: TrailFilters) =>
  infiniteQueryOptions({
    queryKey: [...stewardKey, 'trail', filters] as const,
    queryFn: ({ pageParam, signal }) => {
      const query = new URLSearchParams();
      for (const [name, value] of Object.entries(filters)) if (value) query.set(name, value);
      if (pageParam !== null) query.set('before', String(pageParam));
      return apiRequest(trailPageSchema, `/api/steward/trail?${query.toString()}`, { signal });
    },
    initialPageParam: null as number | null,
    getNextPageParam: ({ next }) => next,
    staleTime: 10_000,
  });

const post = (path: string, body: object = {}) => apiRequest(acceptedSchema, path, { method: 'POST', body });

function useInvalidateSteward() {
  const client = useQueryClient();
  return () => void client.invalidateQueries({ queryKey: stewardKey });
}

/** Looks an account up by its address or its number; null when there is none. */
export function useFindPerson() {
  return useMutation({
    mutationFn: (body: FindPersonRequest) =>
      apiRequest(foundPersonSchema, '/api/steward/people/find', { method: 'POST', body }),
  });
}

/** Gives an account a role. Invalidates: all the steward reads. */
export function useAppoint() {
  const invalidate = useInvalidateSteward();
  return useMutation({
    mutationFn: (request: AppointRequest) => post('/api/steward/people/appoint', request),
    onSuccess: invalidate,
  });
}

export type PersonAct = 'dismiss' | 'lock' | 'unlock' | 'clear-second-factor';

/** Takes a role away, locks, unlocks or clears the second factor. Invalidates: all the steward reads. */
export function useChangePerson(userId: string, act: PersonAct) {
  const invalidate = useInvalidateSteward();
  return useMutation({
    mutationFn: (request: ChangePersonRequest) => post(`/api/steward/people/${userId}/${act}`, request),
    onSuccess: invalidate,
  });
}

/** Has a failed job or an undelivered mail tried again. Invalidates: all the steward reads. */
export function useRetry(what: 'jobs' | 'mails') {
  const invalidate = useInvalidateSteward();
  return useMutation({
    mutationFn: (id: string) => post(`/api/steward/${what}/${id}/retry`),
    onSettled: invalidate,
  });
}

/** Has the chain of the trail walked along. Invalidates: all the steward reads. */
export function useCheckTrail() {
  const invalidate = useInvalidateSteward();
  return useMutation({ mutationFn: () => post('/api/steward/trail/check'), onSettled: invalidate });
}

/** Takes a check out of both pools at once. Invalidates: the queue and all submissions. */
export function useRecallAtOnce(checkId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: (body: RecallAtOnceRequest) =>
      apiRequest(recallAtOnceSchema, `/api/screening/${checkId}/recall-at-once`, { method: 'POST', body }),
    onSettled: () => void client.invalidateQueries({ queryKey: screeningKey }),
  });
}
