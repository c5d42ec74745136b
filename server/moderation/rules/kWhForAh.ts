import { formatNumber } from '@/lib/units';

import { slipRule } from './scale';

/** Energy in kWh given in the place of charge. */
export const kWhForAh = slipRule('kWhForAh', {
  title: 'kWh typed as Ah',
  how: ({ bank }) => `read as kWh over ${formatNumber(bank.series)} cells of 3.2 V`,
  ask: 'Is it the energy in kWh? The charge in Ah stands beside it on most meters.',
});
