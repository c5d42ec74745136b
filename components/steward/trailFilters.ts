import { useGlobalSearchParams } from 'expo-router';

import type { TrailFilters } from '@/lib/client/steward';
import { type TrailKind, trailKindSchema } from '@/lib/contract/steward';
import { isCalendarDate } from '@/lib/units';

type Params = Record<string, string | string[] | undefined>;

export const trailKinds: Record<TrailKind, string> = {
  check: 'Checks',
  bank: 'Banks',
  account: 'Accounts',
  cellType: 'Cell types',
  pool: 'Public pool',
  release: 'Releases',
};

/** The trail's filters as the address holds them; what it can't hold is left out. */
export function readTrailFilters(params: Params): TrailFilters {
  const one = (name: string) => {
    const value = params[name];
    return typeof value === 'string' && value !== '' ? value : undefined;
  };
  const day = (name: string) => {
    const value = one(name);
    return value && isCalendarDate(value) ? value : undefined;
  };
  const given = {
    kind: trailKindSchema.safeParse(one('kind')).data,
    record: one('record')?.trim(),
    from: day('from'),
    to: day('to'),
  };
  return Object.fromEntries(Object.entries(given).filter(([, value]) => value !== undefined));
}

export const useTrailFilters = (): TrailFilters => readTrailFilters(useGlobalSearchParams());
