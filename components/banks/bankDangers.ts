import type { BankEvent, BankEventKind } from '@/lib/contract/banks';

interface Danger {
  title: string;
  text: string;
}

const swollen: Danger = {
  title: 'A swollen cell means stop',
  text: "Take the bank out of use. The cell is never pressed flat, charged or tested on. The maker's instructions and local codes come first.",
};

const handsOn: Danger = {
  title: 'Before you work on it',
  text: 'Disconnect it, insulated tools, no jewellery, eye protection: a bank drives very high currents into a short circuit. Bring cells to equal voltage before they are put in parallel.',
};

/** Kinds of event that mean hands on the bank, or that it must be left alone. */
export const dangers: Partial<Record<string, Danger>> = {
  swollen,
  cellFailed: handsOn,
  cellReplaced: handsOn,
  rebalanced: handsOn,
  clampingChanged: handsOn,
  layoutChanged: handsOn,
};

const failed: Danger = {
  title: 'A failed cell is left alone',
  text: 'Do not charge, test or press on until it is out and its group is back to equal voltage. Warm, leaking or swollen: stop, and keep away from it. It goes to a collection point for lithium batteries, not into the waste.',
};

const standing: Partial<Record<BankEventKind, Danger>> = { swollen, cellFailed: failed };

/** What still has to be heeded of a bank: a cell that swelled or failed, until one was replaced. Events by their day. */
export function standingDangers(events: readonly Pick<BankEvent, 'kind'>[]): Danger[] {
  const since = events.slice(events.findLastIndex(({ kind }) => kind === 'cellReplaced') + 1);
  return [...new Set(since.flatMap(({ kind }) => standing[kind] ?? []))];
}
