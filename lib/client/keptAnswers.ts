import type { QueryClient, QueryKey } from '@tanstack/react-query';
import type { z } from 'zod';

import { bankListSchema, bankSchema, cellTypeListSchema } from '@/lib/contract/banks';
import { checkListSchema } from '@/lib/contract/checks';
import { reminderSchema } from '@/lib/contract/reminders';

import { bankQuery, banksKey, banksQuery, cellTypesQuery } from './banks';
import { bankChecksQuery } from './checks';
import { forgetAll, keep, readAllKept } from './deviceStore';
import { staleAfterMs } from './queryClient';

interface KeptAnswer {
  queryKey: QueryKey;
  data: unknown;
  /** When it was answered, ms. */
  at: number;
}

/** By the shape of their keys: what the pages of one's banks and the form of a check need where there is no network. */
const kinds: readonly { isOf: (key: QueryKey) => boolean; schema: z.ZodType }[] = [
  { isOf: (key) => key[0] === banksKey[0] && key.length === 1, schema: bankListSchema.shape.banks },
  { isOf: (key) => key[0] === banksKey[0] && key.length === 2, schema: bankSchema },
  { isOf: (key) => key[0] === banksKey[0] && key[2] === 'checks', schema: checkListSchema.shape.checks },
  { isOf: (key) => key[0] === banksKey[0] && key[2] === 'reminder', schema: reminderSchema },
  {
    isOf: (key) => key[0] === cellTypesQuery.queryKey[0],
    schema: cellTypeListSchema.shape.cellTypes,
  },
];

const kindOf = (queryKey: QueryKey) => kinds.find(({ isOf }) => isOf(queryKey));

/** Puts an account's kept answers where nothing is known yet; they are asked for anew as soon as they are shown. */
export async function restoreAnswers(client: QueryClient, userId: string): Promise<void> {
  // However lately it was kept: a page that is opened anew is to be as new.
  const staleAt = Date.now() - staleAfterMs;
  for (const { queryKey, data, at } of await readAllKept<KeptAnswer>('answers', `${userId}/`)) {
    if (client.getQueryData(queryKey) !== undefined) continue;
    // Kept by an older version, it may be of another shape.
    const read = kindOf(queryKey)?.schema.safeParse(data);
    if (read?.success) client.setQueryData(queryKey, read.data, { updatedAt: Math.min(at, staleAt) });
  }
}

/** Keeps an account's answers as they come; returns what ends it. */
export function keepAnswers(client: QueryClient, userId: string): () => void {
  return client.getQueryCache().subscribe((event) => {
    if (event.type !== 'updated' || event.action.type !== 'success') return;
    const { queryKey, state } = event.query;
    if (event.action.manual || !kindOf(queryKey)) return;
    void keepAnswer(userId, { queryKey, data: state.data, at: state.dataUpdatedAt });
  });
}

const keepAnswer = (userId: string, answer: KeptAnswer) =>
  keep('answers', `${userId}/${JSON.stringify(answer.queryKey)}`, answer);

const freshMs = 60 * 60_000;

/** Asks ahead for what the forms of an owner's banks need, so that they open where there is no signal. */
export async function fetchAhead(client: QueryClient, userId: string): Promise<void> {
  await client.prefetchQuery(cellTypesQuery);
  const banks = await client.fetchQuery({ ...banksQuery, staleTime: 0 }).catch(() => []);
  for (const bank of banks) {
    const { queryKey } = bankQuery(bank.id);
    if (client.getQueryData(queryKey) === undefined) client.setQueryData(queryKey, bank);
    await keepAnswer(userId, { queryKey, data: bank, at: Date.now() });
    await client.prefetchQuery({ ...bankChecksQuery(bank.id), staleTime: freshMs });
  }
}

/** Forgets an account's answers on this device. */
export const forgetAnswers = (userId: string) => forgetAll('answers', `${userId}/`);
