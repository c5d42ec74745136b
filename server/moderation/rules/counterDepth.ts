import { formatPercent, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';
import { comparableBefore } from './history';

/** How far the two may lie apart before it is worth a look, and before one of them must be wrong. Common practice, no source. */
const smallFraction = 0.15;
const largeFraction = 0.5;

/** The counter against depth x cycles a day x days. */
export const counterDepth: Rule = (context) => {
  const { computed, fields } = context;
  if (computed.efcFromCounter === null || computed.efcFromDepth === null) return null;
  const start = comparableBefore(context)?.computed.efc ?? 0;
  const counted = computed.efcFromCounter - start;
  const figured = computed.efcFromDepth - start;
  if (counted <= 0 || figured <= 0) return null;
  const difference = Math.abs(counted / figured - 1);
  const isFine = difference <= smallFraction;
  const figures = `Counter says ${formatQuantity(counted, 'full cycles', { decimals: 0 })} ${start > 0 ? 'since the last check' : 'since new'}; ${formatPercent(fields.conditions.depthFraction)} a cycle would be ${formatQuantity(figured, 'full cycles', { decimals: 0 })}.`;
  return {
    rule: 'counterDepth',
    title: 'Counter against depth',
    severity: isFine ? 'fits' : difference <= largeFraction ? 'look' : 'doubtful',
    ownerText: isFine
      ? `${figures} That agrees.`
      : `${figures} Check the depth, the cycles a day and the counter's unit.`,
    moderatorText: `${figures} ${isFine ? 'Within' : 'Apart by'} ${formatPercent(difference)}.`,
    evidence: { efcFromCounter: counted, efcFromDepth: figured, differenceFraction: difference },
  };
};
