import { formatPercent } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Share of the charge that falls into gaps, from which they are flagged (calculation 1) and past mending. */
const flaggedFraction = 0.01;
const largeFraction = 0.05;

/** Charge in the gaps of a log is guessed between its ends. */
export const logGaps: Rule = ({ log }) => {
  if (!log) return null;
  const share = log.gapChargeFraction;
  const isFine = share <= flaggedFraction;
  const part = formatPercent(share, 1);
  return {
    rule: 'logGaps',
    title: isFine ? 'Log without gaps' : 'Gaps in the log',
    severity: isFine ? 'fits' : share <= largeFraction ? 'look' : 'doubtful',
    ownerText: isFine
      ? `${part} of the charge lies in gaps.`
      : `${part} of the charge lies in gaps of the log, where it can only be guessed. If the meter shows its own Ah, compare.`,
    moderatorText: `${part} of the charge lies in gaps; ${log.legs === 1 ? 'one leg' : `${log.legs} legs joined`}.`,
    evidence: { gapChargeFraction: share, legs: log.legs },
  };
};
