import { formatNumber, formatPercent, formatQuantity } from '@/lib/units';

import type { CurveLikeness, Rule } from '../screenTypes';

/**
 * A copy of the very rows, rounded or scaled, differs by less than two readings' noise; a thinned one keeps the day's
 * temperature and length. Two tests of one bank share neither. Judgement, held against scripts/bench/screening.ts.
 */
const sameRows = {
  voltageFraction: 0.00012,
  currentFraction: 0.0009,
  temperatureK: 0.35,
  durationFraction: 0.002,
};
const sameDay = {
  voltageFraction: 0.0008,
  currentFraction: 0.005,
  temperatureK: 0.05,
  durationFraction: 0.004,
};

/** A log that was saved anew, rounded, thinned or scaled has other bytes and the same curve. */
export const sameCurve: Rule = ({ log, nearestLog, sameLogCheckIds }) => {
  if (!log || !nearestLog || sameLogCheckIds.length > 0) return null;
  const { voltageFraction, currentFraction, temperatureK, durationFraction, detailCorrelation } = nearestLog;
  const severity = isWithin(nearestLog, sameRows)
    ? 'doubtful'
    : isWithin(nearestLog, sameDay)
      ? 'look'
      : 'fits';
  const figures = [
    `voltage ${formatPercent(voltageFraction, 2)} apart`,
    ...(currentFraction === null ? [] : [`current ${formatPercent(currentFraction, 2)}`]),
    ...(temperatureK === null ? [] : [`temperature ${formatQuantity(temperatureK, 'K', { decimals: 2 })}`]),
    `duration ${formatPercent(durationFraction, 2)}`,
  ].join(', ');
  return {
    rule: 'sameCurve',
    title:
      severity === 'fits'
        ? 'Curve is new'
        : severity === 'look'
          ? 'Curve much like another'
          : 'Curve seen before',
    severity,
    ownerText:
      severity === 'fits'
        ? 'The curve of this log is like no other.'
        : 'The curve of this log is that of another check, or very near it. One test is one check; was the wrong file chosen?',
    moderatorText: `The nearest other log: ${figures}; small details correlate by ${formatNumber(detailCorrelation, { decimals: 2 })}.`,
    evidence: {
      voltageFraction,
      durationFraction,
      detailCorrelation: Number(detailCorrelation.toFixed(3)),
      ...(currentFraction === null ? {} : { currentFraction }),
      ...(temperatureK === null ? {} : { temperatureK }),
    },
  };
};

function isWithin(likeness: CurveLikeness, cuts: typeof sameRows): boolean {
  return (
    likeness.voltageFraction <= cuts.voltageFraction &&
    likeness.durationFraction <= cuts.durationFraction &&
    (likeness.currentFraction ?? 0) <= cuts.currentFraction &&
    (likeness.temperatureK ?? 0) <= cuts.temperatureK
  );
}
