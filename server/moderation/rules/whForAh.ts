import { formatNumber } from '@/lib/units';

import { slipRule } from './scale';

/** Energy given in the place of charge. */
export const whForAh = slipRule('whForAh', {
  title: 'Wh typed as Ah',
  how: ({ bank }) => `read as Wh over ${formatNumber(bank.series)} cells of 3.2 V`,
  ask: 'Is it the energy in Wh? The charge in Ah stands beside it on most meters.',
});
