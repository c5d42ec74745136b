import { useCallback, useMemo, useSyncExternalStore } from 'react';
import { z } from 'zod';

import { forgetDraft, readDraft, writeDraft } from '@/components/forms';

/** The stages of a test, in their order. */
export const testStages = ['prepare', 'charge', 'rest', 'discharge', 'recharge', 'noted'] as const;
export type TestStage = (typeof testStages)[number];

const instant = z.string().refine((text) => !Number.isNaN(Date.parse(text)));

/**
 * A test under way, as it is kept on the device: when each stage began, never how much of it is left, so that it is right
 * after a locked phone or a reload. Readings are as typed, under the names of the form's fields.
 */
const testRunSchema = z.object({
  stage: z.enum(testStages),
  isAware: z.boolean(),
  startedAt: z.partialRecord(z.enum(testStages), instant),
  readings: z.record(z.string(), z.string()),
});
export type TestRun = z.infer<typeof testRunSchema>;

export const newTestRun: TestRun = {
  stage: 'prepare',
  isAware: false,
  startedAt: {},
  readings: {},
};

const keyOf = (userId: string, bankId: string) => `${userId}/test/${bankId}`;
const listeners = new Set<() => void>();

export function readTestRun(userId: string, bankId: string): TestRun | undefined {
  return testRunSchema.safeParse(readDraft(keyOf(userId, bankId))).data;
}

/** @returns whether the device keeps it */
export function writeTestRun(userId: string, bankId: string, run: TestRun): boolean {
  const isKept = writeDraft(keyOf(userId, bankId), JSON.stringify(run));
  for (const tell of listeners) tell();
  return isKept;
}

export function forgetTestRun(userId: string, bankId: string): void {
  forgetDraft(keyOf(userId, bankId));
  for (const tell of listeners) tell();
}

function subscribe(tell: () => void) {
  listeners.add(tell);
  window.addEventListener('storage', tell);
  return () => {
    listeners.delete(tell);
    window.removeEventListener('storage', tell);
  };
}

/** The test of a bank that is kept on this device, of other pages of it too; undefined for none. */
export function useTestRun(userId: string | undefined, bankId: string): TestRun | undefined {
  // A snapshot must stay the same while nothing changes: the text does, what is read from it does not.
  const snapshot = useCallback(
    () => (userId === undefined ? '' : JSON.stringify(readTestRun(userId, bankId) ?? null)),
    [userId, bankId],
  );
  const text = useSyncExternalStore(subscribe, snapshot, () => '');
  return useMemo(
    () => (text === '' ? undefined : ((JSON.parse(text) as TestRun | null) ?? undefined)),
    [text],
  );
}
