import { formatDate, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';
import { eventsSince, eventWord } from './history';

/** Rounding of a counter read twice, EFC. */
const roundingEfc = 0.5;

/** A counter since new only grows. */
export const counterBackwards: Rule = (context) => {
  const { computed, fields, previousChecks } = context;
  const now = computed.efcFromCounter;
  if (now === null) return null;
  const before = previousChecks
    .filter(({ testedOn, state }) => testedOn < fields.reading.testedOn && state !== 'turnedAway')
    .filter((check) => check.computed.efcFromCounter !== null)
    .sort((a, b) => (a.testedOn < b.testedOn ? 1 : -1))[0];
  if (!before) return null;
  const then = before.computed.efcFromCounter!;
  const isFine = now >= then - roundingEfc;
  const change = eventsSince(context, before, ['meterChanged', 'bmsChanged'])[0];
  const figures = `${formatQuantity(then, 'full cycles', { decimals: 0 })} on ${formatDate(before.testedOn)}, ${formatQuantity(now, 'full cycles', { decimals: 0 })} now`;
  const reason = change ? ` Explained by an event: ${eventWord(change.kind)}.` : '';
  return {
    rule: 'counterBackwards',
    title: isFine ? 'Counter since last check' : 'Counter ran backwards',
    severity: isFine ? 'fits' : change ? 'look' : 'doubtful',
    ownerText: isFine
      ? `The counter stood at ${figures}.`
      : `The counter stood at ${figures}. If it was reset or replaced, add the event and give the sum since new.${reason}`,
    moderatorText: `${figures}.${isFine ? '' : reason}`,
    evidence: { efcBefore: then, efcNow: now },
  };
};
