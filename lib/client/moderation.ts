import {
  infiniteQueryOptions,
  queryOptions,
  skipToken,
  useMutation,
  useQuery,
  useQueryClient,
} from '@tanstack/react-query';

import type { CheckState } from '@/lib/contract/checks';
import {
  bulkApprovalSchema,
  claimResultSchema,
  type DecisionRequest,
  type DecisionResult,
  decisionResultSchema,
  type QueueEntry,
  type QueueQuery,
  queueSchema,
  submissionEffectSchema,
  submissionSchema,
  undoResultSchema,
  undoSeconds,
} from '@/lib/contract/moderation';

import { cellsKey } from './cells';
import { fitsKey } from './fits';
import { apiRequest } from './http';

/** Queue and submissions lie under this key. */
export const screeningKey = ['screening'] as const;

export type QueueFilters = Pick<QueueQuery, 'severity' | 'cellType' | 'rule'> & { state: CheckState };

/** The queue page by page, the worst findings first. Others decide meanwhile, so it ages fast. */
export const queueQuery = (filters: QueueFilters) =>
  infiniteQueryOptions({
    queryKey: [...screeningKey, 'queue', filters] as const,
    queryFn: ({ pageParam, signal }) => {
      const query = new URLSearchParams();
      for (const [name, value] of Object.entries(filters)) if (value) query.set(name, value);
      if (pageParam !== null) query.set('after', pageParam);
      return apiRequest(queueSchema, `/api/screening?${query.toString()}`, { signal });
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

/** Two fits stand behind it, so it is asked for apart from the submission, once for each of its versions. */
export const effectQuery = (checkId: string, version: number) =>
  queryOptions({
    queryKey: [...screeningKey, 'effect', checkId, version] as const,
    queryFn: ({ signal }) =>
      apiRequest(submissionEffectSchema, `/api/screening/${checkId}/effect`, { signal }),
    staleTime: 300_000,
  });

/** Checks in the queue, all submissions (their bank's history shows this one), fits, cells. */
function useInvalidateDecided() {
  const client = useQueryClient();
  // Not waited for: what follows a decision must not hang on what is read anew.
  return () => {
    for (const queryKey of [screeningKey, fitsKey, cellsKey]) void client.invalidateQueries({ queryKey });
  };
}

/** Own decisions that can still be taken back. */
export interface UndoOffer {
  decisionIds: string[];
  /** What was done, in words. */
  what: string;
  /** By the clock of this browser. */
  until: string;
}

const undoKey = ['undoOffer'] as const;

/** By this browser's clock, which may differ from the server's. */
const undoneUntil = () => new Date(Date.now() + undoSeconds * 1000).toISOString();

/** The last decisions of this browser, kept while pages change; null when there is nothing to take back. */
export function useUndoOffer(): UndoOffer | null {
  const query = queryOptions<UndoOffer | null>({ queryKey: undoKey, queryFn: skipToken, initialData: null });
  return useQuery(query).data ?? null;
}

function useSetUndoOffer() {
  const client = useQueryClient();
  return (offer: UndoOffer | null) => client.setQueryData<UndoOffer | null>(undoKey, offer);
}

/**
 * Decides; `what` says it in words for taking it back. Invalidates: the queue, all submissions, fits, cells; after a
 * refusal too.
 * @param onDone called although the page has moved on meanwhile
 */
export function useDecide(checkId: string, onDone: (result: DecisionResult) => void) {
  const invalidate = useInvalidateDecided();
  const setOffer = useSetUndoOffer();
  return useMutation({
    mutationFn: ({ decision }: { decision: DecisionRequest; what: string }) =>
      apiRequest(decisionResultSchema, `/api/screening/${checkId}/decision`, {
        method: 'POST',
        body: decision,
      }),
    onSuccess(result, { what }) {
      const { decisionId } = result;
      if (decisionId) setOffer({ decisionIds: [decisionId], until: undoneUntil(), what });
      onDone(result);
    },
    onSettled: invalidate,
  });
}

/** Approves clean checks together. Invalidates as useDecide. */
export function useApproveClean() {
  const invalidate = useInvalidateDecided();
  const setOffer = useSetUndoOffer();
  return useMutation({
    mutationFn: (checks: Pick<QueueEntry, 'checkId' | 'version'>[]) =>
      apiRequest(bulkApprovalSchema, '/api/screening/approve-clean', {
        method: 'POST',
        body: { checks: checks.map(({ checkId, version }) => ({ checkId, version })) },
      }),
    onSuccess: ({ results }) => {
      const decisionIds = results.flatMap(({ decisionId }) => decisionId ?? []);
      const count = decisionIds.length;
      if (count > 0)
        setOffer({
          decisionIds,
          until: undoneUntil(),
          what: `${count} ${count === 1 ? 'check' : 'checks'} approved`,
        });
    },
    onSettled: invalidate,
  });
}

/** Takes the last decisions back; `onDone` as of useDecide. Invalidates as that. */
export function useUndo(onDone: (problem: string | null) => void) {
  const invalidate = useInvalidateDecided();
  const setOffer = useSetUndoOffer();
  return useMutation({
    mutationFn: ({ decisionIds }: Pick<UndoOffer, 'decisionIds'>) =>
      apiRequest(undoResultSchema, '/api/screening/undo', { method: 'POST', body: { decisionIds } }),
    onSuccess({ results }) {
      setOffer(null);
      onDone(results.find(({ problem }) => problem !== null)?.problem ?? null);
    },
    onSettled: invalidate,
  });
}

/** Takes a check to work on, or keeps it. Invalidates: the submission. */
export function useClaim(checkId: string) {
  const client = useQueryClient();
  return useMutation({
    mutationFn: () =>
      apiRequest(claimResultSchema, `/api/screening/${checkId}/claim`, { method: 'POST', body: {} }),
    onSettled: () => client.invalidateQueries({ queryKey: submissionQuery(checkId).queryKey }),
  });
}

/** Gives a check back to the others. */
export function useRelease(checkId: string) {
  return useMutation({
    mutationFn: () =>
      apiRequest(claimResultSchema, `/api/screening/${checkId}/release`, { method: 'POST', body: {} }),
  });
}
