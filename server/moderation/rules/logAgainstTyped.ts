import { formatPercent, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Disagreement of the log with what is given: rounding, another figure, another test. Common practice, no source. */
const smallFraction = 0.01;
const largeFraction = 0.05;

/** The log behind a reading gives its capacity. */
export const logAgainstTyped: Rule = ({ fields, log }) => {
  if (!log) return null;
  const difference = Math.abs(fields.reading.capacityAh / log.capacityAh - 1);
  const isFine = difference <= smallFraction;
  const figures = `${formatQuantity(log.capacityAh, 'Ah', { decimals: 1 })} by the log, ${formatQuantity(fields.reading.capacityAh, 'Ah', { decimals: 1 })} given`;
  return {
    rule: 'logAgainstTyped',
    title: isFine ? 'Log and figure agree' : 'Log and figure differ',
    severity: isFine ? 'fits' : difference <= largeFraction ? 'look' : 'doubtful',
    ownerText: isFine
      ? `${figures}.`
      : `${figures}. Say in the note why they differ, or use the log's figure.`,
    moderatorText: `${figures}: ${formatPercent(difference, 1)} apart.`,
    evidence: { logAh: log.capacityAh, typedAh: fields.reading.capacityAh, differenceFraction: difference },
  };
};
