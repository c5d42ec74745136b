import { formatPercent, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';

/** Disagreement of mean current x duration with the Ah: read off roughly, and beyond that. Common practice, no source. */
const smallFraction = 0.05;
const largeFraction = 0.15;

/** Mean current times duration is the charge. */
export const rateDuration: Rule = ({ fields: { reading } }) => {
  const productAh = (reading.meanCurrentA * reading.durationS) / 3600;
  const difference = Math.abs(productAh / reading.capacityAh - 1);
  const product = formatQuantity(productAh, 'Ah', { decimals: 1 });
  const typed = formatQuantity(reading.capacityAh, 'Ah', { decimals: 1 });
  const isFine = difference <= smallFraction;
  return {
    rule: 'rateDuration',
    title: 'Current and duration',
    severity: isFine ? 'fits' : difference <= largeFraction ? 'look' : 'doubtful',
    ownerText: isFine
      ? `Current times duration is ${product}, as typed within ${formatPercent(smallFraction)}.`
      : `Current times duration is ${product}, but ${typed} are given. Check the three figures.`,
    moderatorText: `Mean current times duration is ${product} against ${typed}: ${formatPercent(difference)} apart.`,
    evidence: {
      productAh: Number(productAh.toFixed(2)),
      capacityAh: reading.capacityAh,
      differenceFraction: difference,
    },
  };
};
