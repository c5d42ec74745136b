import { formatNumber, formatPercent } from '@/lib/units';

import type { Rule } from '../screenTypes';
import { swappedFigures } from './scale';

/** Cells in series and in parallel given for each other: capacity and voltage are both off, by the same ratio. */
export const layoutSwapped: Rule = (context) => {
  const swapped = swappedFigures(context);
  if (!swapped) return null;
  const { parallel, series } = context.bank;
  const layout = `${series}p${parallel}s`;
  const { sohFraction, cellV } = swapped;
  return {
    rule: 'layoutSwapped',
    title: 'Series and parallel swapped',
    severity: 'repairable',
    ownerText: `As ${layout} the figures fit; the bank says ${parallel}p${series}s. Were the cells in parallel and in series given for each other? Correct the bank.`,
    moderatorText: `As ${layout} it would be ${formatPercent(sohFraction, 1)} of rated at ${formatNumber(cellV, { decimals: 3 })} V per cell, which both fit. The owner has to correct the bank.`,
    evidence: { parallel, series, swappedSohFraction: sohFraction, swappedCellV: cellV },
  };
};
