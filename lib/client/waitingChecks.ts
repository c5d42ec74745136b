import { type QueryClient, queryOptions } from '@tanstack/react-query';

import { type Check, type CheckInput, checkSchema } from '@/lib/contract/checks';
import { photoSchema } from '@/lib/contract/uploads';

import { banksKey, checksKey } from './banks';
import { forget, keep, readAllKept, readKept } from './deviceStore';
import { ApiError, apiRequest, isSessionLost, uploadFile } from './http';
import { forgetKeptFiles, takeKeptFiles } from './keptFiles';
import { sessionKey } from './session';

/** A check whose owner pressed send where there was no network. One for each bank. */
export interface WaitingCheck {
  bankId: string;
  bankName: string;
  check: CheckInput;
  /** A photo kept on the device goes before it. */
  hasPhoto: boolean;
  /** Why the server would not have it; null while it waits for the network only. */
  problem: string | null;
}

/** An account's waiting checks, as they are kept on this device. */
export const waitingChecksQuery = (userId: string) =>
  queryOptions({
    queryKey: ['waitingChecks', userId] as const,
    queryFn: () => readAllKept<WaitingCheck>('waiting', `${userId}/`),
    staleTime: 0,
  });

const placeOf = (userId: string, bankId: string) => `${userId}/${bankId}`;
const refresh = (client: QueryClient, userId: string) =>
  client.invalidateQueries({ queryKey: waitingChecksQuery(userId).queryKey });

/** One page at a time: two would send the same check at once, and one would take back what the other is sending. */
const alone = <T>(work: () => Promise<T>): Promise<T> =>
  'locks' in navigator ? navigator.locks.request('ebbline.waiting', work) : work();

/** @returns whether it is kept */
export async function putWaiting(
  client: QueryClient,
  userId: string,
  waiting: WaitingCheck,
): Promise<boolean> {
  const isKept = await alone(() => keep('waiting', placeOf(userId, waiting.bankId), waiting));
  await refresh(client, userId);
  return isKept;
}

/** Takes a check back before it is sent. @returns whether it was still there */
export async function takeBackWaiting(client: QueryClient, userId: string, bankId: string): Promise<boolean> {
  const wasThere = await alone(async () => {
    const place = placeOf(userId, bankId);
    const waiting = await readKept<WaitingCheck>('waiting', place);
    await forget('waiting', place);
    return waiting !== undefined;
  });
  await refresh(client, userId);
  return wasThere;
}

export interface SendingOutcome {
  sent: { waiting: WaitingCheck; check: Check }[];
  refused: WaitingCheck[];
}

/**
 * Sends what waits, the photo first. Each goes under its own key, so that one whose answer was lost is not stored twice. Ends
 * at the first that finds no network or no sign-in; what the server refuses is kept with its reason, for its owner to mend.
 */
export function sendWaiting(client: QueryClient, userId: string): Promise<SendingOutcome> {
  return alone(async () => {
    const outcome: SendingOutcome = { sent: [], refused: [] };
    const all = await readAllKept<WaitingCheck>('waiting', `${userId}/`);
    for (const waiting of all.filter(({ problem }) => problem === null)) {
      try {
        outcome.sent.push({ waiting, check: await sendOne(userId, waiting) });
      } catch (error) {
        if (isSessionLost(error)) void client.invalidateQueries({ queryKey: sessionKey });
        if (!(error instanceof ApiError) || canWait(error)) break;
        const problem = [error.message, ...Object.values(error.fields)].join(' ');
        await keep('waiting', placeOf(userId, waiting.bankId), { ...waiting, problem });
        outcome.refused.push({ ...waiting, problem });
      }
    }
    if (outcome.sent.length + outcome.refused.length > 0) {
      await refresh(client, userId);
      await client.invalidateQueries({ queryKey: banksKey });
      await client.invalidateQueries({ queryKey: checksKey });
    }
    return outcome;
  });
}

const canWait = (error: ApiError) =>
  error.status === 0 || error.status >= 500 || error.status === 429 || isSessionLost(error);

async function sendOne(userId: string, waiting: WaitingCheck): Promise<Check> {
  const { bankId, hasPhoto } = waiting;
  let { check } = waiting;
  const [photo] = hasPhoto ? await takeKeptFiles(userId, 'photo', bankId) : [];
  if (photo) {
    const { id: photoId } = await uploadFile(photoSchema, `/api/banks/${bankId}/photos`, photo);
    check = { ...check, photoId };
    // Sent once: a check that fails after it goes with the photo that is there.
    await keep('waiting', placeOf(userId, bankId), { ...waiting, check, hasPhoto: false });
    await forgetKeptFiles(userId, 'photo', bankId);
  }
  const path = `/api/banks/${bankId}/checks`;
  const stored = await apiRequest(checkSchema, path, { method: 'POST', body: check });
  await forget('waiting', placeOf(userId, bankId));
  return stored;
}
