import { slipRule } from './scale';

/** Charge given in mAh. */
export const mAhForAh = slipRule('mAhForAh', {
  title: 'mAh typed as Ah',
  how: () => 'read as mAh',
  ask: 'Is it in mAh? Divide by 1,000 and give Ah.',
});
