import { formatCount, formatNumber, formatPercent } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Standardised residuals at which the outlier screen lists a check and sets it aside: section 7 of lib/fit's README. */
export const listCut = 3.5;
export const quarantineCut = 4;

/** The capacity against what the pool expects under the bank's conditions, and the bank's own checks lead on to. */
export const poolResidual: Rule = ({ pool, fields }) => {
  if (!pool) return null;
  const { seenFraction, expectedFraction, t, others } = pool;
  const size = Math.abs(t);
  const { depthFraction, temperatureMeanC } = fields.conditions;
  const from =
    others === 0
      ? `banks used like it (${formatPercent(depthFraction)} deep, ${formatNumber(temperatureMeanC, { decimals: 0 })} °C)`
      : `its own ${others === 1 ? 'approved check' : `${formatCount(others)} approved checks`} and the pool`;
  const figures = `${formatPercent(seenFraction, 1)} of rated; ${formatPercent(expectedFraction, 1)} is expected from ${from}`;
  const isFine = size < listCut;
  return {
    rule: 'poolResidual',
    title: isFine ? 'Fits the pool' : 'Far from the pool',
    severity: isFine ? 'fits' : size < quarantineCut ? 'look' : 'doubtful',
    ownerText: isFine
      ? `${figures}.`
      : `${figures}. Check the figures and the conditions. If something failed, add the event: failures count.`,
    moderatorText: `${figures}: ${formatNumber(size, { decimals: 1 })} standard deviations ${t < 0 ? 'below' : 'above'}.`,
    evidence: { seenFraction, expectedFraction, t: Number(t.toFixed(2)), otherChecks: others },
  };
};
