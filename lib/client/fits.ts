import { queryOptions } from '@tanstack/react-query';

import { fitDetailSchema, fitListSchema, publicFitSchema } from '@/lib/contract/fits';

import { cellsKey } from './cells';
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

/** What a run found about single checks and banks: for moderators. */
export const fitDetailQuery = (fitId: string) =>
  queryOptions({
    queryKey: [...fitsKey, 'run', fitId] as const,
    queryFn: ({ signal }) =>
      apiRequest(fitDetailSchema, `/api/fits/${encodeURIComponent(fitId)}`, { signal }),
  });

/** The public fit in force, with what it is checked by; lies with the cell types whose figures it gives. */
export const publicFitQuery = () =>
  queryOptions({
    queryKey: [...cellsKey, 'fit'] as const,
    queryFn: ({ signal }) => apiRequest(publicFitSchema, '/api/fits/public', { signal }),
  });
