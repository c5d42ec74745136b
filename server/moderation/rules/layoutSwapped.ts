import { usualMeanCellV } from '@/lib/measure';
import { formatNumber, formatPercent } from '@/lib/units';

import type { Rule } from '../screenTypes';
import { isPlausible } from './scale';

/** Cells in series and in parallel given for each other: capacity and voltage are both off, by the same ratio. */
export const layoutSwapped: Rule = ({ bank, computed, fields }) => {
  const { parallel, series } = bank;
  const ratio = series / parallel;
  if (ratio === 1 || isPlausible(computed.sohFraction)) return null;
  const soh = computed.sohFraction / ratio;
  const cellV = computed.meanCellV * ratio;
  const { min, max } = usualMeanCellV[fields.reading.method];
  if (!isPlausible(soh) || cellV < min || cellV > max) return null;
  const swapped = `${series}p${parallel}s`;
  return {
    rule: 'layoutSwapped',
    title: 'Series and parallel swapped',
    severity: 'repairable',
    ownerText: `As ${swapped} the figures fit; the bank says ${parallel}p${series}s. Were the cells in parallel and in series given for each other? Correct the bank.`,
    moderatorText: `As ${swapped} it would be ${formatPercent(soh, 1)} of rated at ${formatNumber(cellV, { decimals: 3 })} V per cell, which both fit. The owner has to correct the bank.`,
    evidence: { parallel, series, swappedSohFraction: soh, swappedCellV: cellV },
  };
};
