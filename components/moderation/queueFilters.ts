import { useGlobalSearchParams } from 'expo-router';

import type { QueueFilters } from '@/lib/client/moderation';
import { checkStateSchema, severitySchema } from '@/lib/contract/checks';

type Params = Record<string, string | string[] | undefined>;

/** The queue's filters as the address holds them; what it can't hold is left out. */
export function readFilters(params: Params): QueueFilters {
  const one = (name: string) => (typeof params[name] === 'string' ? params[name] : undefined);
  const state = checkStateSchema.safeParse(one('state')).data ?? 'submitted';
  const severity = severitySchema.safeParse(one('severity')).data;
  const rule = one('rule');
  const cellType = one('cellType');
  return {
    state,
    ...(severity ? { severity } : {}),
    ...(cellType ? { cellType } : {}),
    ...(rule ? { rule } : {}),
  };
}

/** The filters for an address; the usual state needs no words. */
export function writeFilters({ state, ...filters }: QueueFilters): Record<string, string> {
  const given = Object.entries(filters).filter((pair): pair is [string, string] => Boolean(pair[1]));
  return { ...(state === 'submitted' ? {} : { state }), ...Object.fromEntries(given) };
}

export const useQueueFilters = (): QueueFilters => readFilters(useGlobalSearchParams());
