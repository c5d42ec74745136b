import { formatNumber } from '@/lib/units';

import { slipRule } from './scale';

/** Ah of the cells in series added up: the same charge runs through all of them. */
export const seriesAddedUp = slipRule('seriesAddedUp', {
  title: 'Cells in series added up',
  how: ({ bank }) => `divided by ${formatNumber(bank.series)} in series`,
  ask: 'Were the cells in series added up? The same charge runs through each of them, so it counts once.',
});
