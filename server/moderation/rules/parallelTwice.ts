import { formatNumber } from '@/lib/units';

import { slipRule } from './scale';

/** The bank's Ah multiplied by the cells in parallel once more. */
export const parallelTwice = slipRule('parallelTwice', {
  title: 'Bank figure for a cell',
  how: ({ bank }) => `divided by ${formatNumber(bank.parallel)} in parallel`,
  ask: 'Were the cells in parallel counted twice? Give the charge as the meter showed it for the whole bank.',
});
