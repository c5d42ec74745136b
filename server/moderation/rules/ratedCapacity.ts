import { formatPercent, formatQuantity } from '@/lib/units';

import type { Rule } from '../screenTypes';
import { isPlausible, likelySlip, plausibleSoh, ratedBankAh } from './scale';

/** The capacity does not go with the rated one, and no slip of scale explains it: another cell type, or other cells in parallel. */
export const ratedCapacity: Rule = (context) => {
  const { bank, computed, fields } = context;
  if (likelySlip(context)) return null;
  const soh = computed.sohFraction;
  const rated = formatQuantity(ratedBankAh(context), 'Ah');
  const share = formatPercent(soh, 1);
  const cellAh = fields.reading.capacityAh / bank.parallel;
  const isFine = isPlausible(soh);
  return {
    rule: 'ratedCapacity',
    title: 'Capacity against rated',
    severity: isFine ? 'fits' : 'doubtful',
    ownerText: isFine
      ? `${share} of the rated ${rated}.`
      : `${share} of the rated ${rated} is not what such cells show. Check the cell type and the cells in parallel of this bank; if the figure is right, say what happened to the bank.`,
    moderatorText: isFine
      ? `${share} of the rated ${rated}.`
      : `${share} of the rated ${rated}, outside ${formatPercent(plausibleSoh.min)} to ${formatPercent(plausibleSoh.max)}, and no slip of scale explains it. It would go with cells of about ${formatQuantity(cellAh, 'Ah', { decimals: 0 })}: wrong rated capacity, or a failed bank.`,
    evidence: { sohFraction: soh, ratedAh: ratedBankAh(context), impliedCellAh: Number(cellAh.toFixed(1)) },
  };
};
