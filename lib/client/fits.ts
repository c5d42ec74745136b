import { queryOptions } from '@tanstack/react-query';

import { fitListSchema } from '@/lib/contract/fits';

import { apiRequest } from './http';

export const fitsKey = ['fits'] as const;

/** How often a running refit is asked after. */
const runningPollMs = 2_000;

/** The runs of the fit, newest first; asked again while one is running. */
export const fitListQuery = () =>
  queryOptions({
    queryKey: fitsKey,
    queryFn: ({ signal }) => apiRequest(fitListSchema, '/api/fits', { signal }),
    refetchInterval: ({ state }) => (state.data?.isRefitRunning ? runningPollMs : false),
  });
