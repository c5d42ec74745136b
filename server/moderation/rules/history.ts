import type { BankEventKind } from '@/lib/contract/banks';

import type { ScreenContext, ScreenPrevious } from '../screenTypes';

const standing = new Set(['approved', 'submitted', 'sentBack']);
/** A check beyond these says nothing of the bank: the hard range of the outlier screen. */
const usableSoh = { min: 0.4, max: 1.25 };

/** The bank's latest check before this one that can be compared with; approved ones go first. */
export function comparableBefore({ fields, previousChecks }: ScreenContext): ScreenPrevious | null {
  const earlier = previousChecks
    .filter(({ testedOn }) => testedOn < fields.reading.testedOn)
    .filter(({ state }) => standing.has(state))
    .filter(({ computed: { sohFraction: soh } }) => soh > usableSoh.min && soh < usableSoh.max)
    .sort((a, b) => (a.testedOn < b.testedOn ? 1 : -1));
  return earlier.find(({ state }) => state === 'approved') ?? earlier[0] ?? null;
}

/** Events of the given kinds after the earlier check up to this one. */
export function eventsSince(context: ScreenContext, before: ScreenPrevious, kinds: readonly BankEventKind[]) {
  return context.bank.events.filter(
    ({ happenedOn, kind }) =>
      happenedOn >= before.testedOn && happenedOn <= context.fields.reading.testedOn && kinds.includes(kind),
  );
}

/** Relative standard uncertainty of the ratio of two checks; the meter's own error cancels unless it was changed. */
export function ratioRelSd(context: ScreenContext, before: ScreenPrevious): number {
  const { computed, fields } = context;
  const isOtherMeter =
    eventsSince(context, before, ['meterChanged', 'bmsChanged']).length > 0 ||
    fields.reading.instrument !== before.fields.reading.instrument;
  const parts = [computed.relSdNew, before.computed.relSdNew];
  if (isOtherMeter) parts.push(computed.relSdMeter, before.computed.relSdMeter);
  return Math.hypot(...parts);
}

const eventWords: Record<BankEventKind, string> = {
  rebalanced: 'rebalanced',
  cellReplaced: 'a cell was replaced',
  cellFailed: 'a cell failed',
  swollen: 'a cell swelled',
  meterChanged: 'the meter was changed',
  bmsChanged: 'the BMS was changed',
  clampingChanged: 'the clamping was changed',
  layoutChanged: 'the layout was changed',
  sold: 'sold',
  retired: 'retired',
};

/** What happened, in words. */
export const eventWord = (kind: BankEventKind) => eventWords[kind];
