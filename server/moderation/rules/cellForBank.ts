import { formatNumber } from '@/lib/units';

import { slipRule } from './scale';

/** One cell's Ah given for a bank with cells in parallel. */
export const cellForBank = slipRule('cellForBank', {
  title: 'Cell figure for the bank',
  how: ({ bank }) => `times ${formatNumber(bank.parallel)} in parallel`,
  ask: 'Is it the figure of one cell? The charge of the whole bank is asked.',
});
