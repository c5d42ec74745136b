import { keepPreviousData, queryOptions } from '@tanstack/react-query';

import { standingSchema, whatIfAnswerSchema, type WhatIf } from '@/lib/contract/standing';

import { banksKey } from './banks';
import { apiRequest } from './http';

/** Where a bank of the signed-in owner's stands among banks used like it. */
export const standingQuery = (bankId: string) =>
  queryOptions({
    queryKey: [...banksKey, bankId, 'standing'] as const,
    queryFn: ({ signal }) => apiRequest(standingSchema, `/api/banks/${bankId}/standing`, { signal }),
  });

/** What other uses would do to its life; the last answer stands while the next is on its way. */
export const whatIfQuery = (bankId: string, tried: WhatIf) =>
  queryOptions({
    queryKey: [...banksKey, bankId, 'whatIf', tried] as const,
    queryFn: ({ signal }) => {
      const query = Object.entries(tried).map(
        ([key, value]) => `${key}=${encodeURIComponent(String(value))}`,
      );
      return apiRequest(whatIfAnswerSchema, `/api/banks/${bankId}/what-if?${query.join('&')}`, { signal });
    },
    enabled: Object.keys(tried).length > 0,
    placeholderData: keepPreviousData,
  });
